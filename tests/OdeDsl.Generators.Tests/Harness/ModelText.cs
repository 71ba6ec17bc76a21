using System.Globalization;
using System.Text;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>Reads a model without generating anything, and shows its equations as text.</summary>
internal static class ModelText
{
    public static ModelReading Read(params string[] sources)
    {
        var compilation = Compiling.Compile(sources);
        foreach (SyntaxTree tree in compilation.SyntaxTrees)
        {
            SemanticModel semantics = compilation.GetSemanticModel(tree);
            foreach (TypeDeclarationSyntax type in tree.GetRoot().DescendantNodes().OfType<TypeDeclarationSyntax>())
            {
                INamedTypeSymbol symbol = (INamedTypeSymbol)semantics.GetDeclaredSymbol(type)!;
                if (symbol.GetAttributes().Any(static attribute => Attributes.Is(attribute, Attributes.Model)))
                    return new ModelReader(symbol, type, compilation, CancellationToken.None).Read();
            }
        }

        throw new InvalidOperationException("No model in the sources.");
    }

    /// <summary>An expression as text, fully parenthesised.</summary>
    public static string Show(ModelDefinition model, int node)
    {
        Node operation = model.Nodes[node];
        string[] operands = [.. new[] { operation.First, operation.Second, operation.Third }.Where(static i => i >= 0).Select(i => Show(model, i))];
        return operation.Operator switch
        {
            Operator.Constant => BitConverter.Int64BitsToDouble(operation.Payload).ToString("R", CultureInfo.InvariantCulture),
            Operator.BooleanConstant => operation.Payload == 1 ? "true" : "false",
            Operator.State => model.States[operation.Index].Property.Name,
            Operator.Parameter => model.Parameters[operation.Index].Property.Name,
            Operator.Time => "time",
            _ => new StringBuilder(operation.Operator.ToString()).Append('(').AppendJoin(", ", operands).Append(')').ToString(),
        };
    }
}
