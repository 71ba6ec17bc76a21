using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;
using OdeDsl.Scalars;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The demonstration models: emitted Jacobians against forward dual numbers, which know nothing of the symbolic rules.</summary>
public sealed class SampleModelTests
{
    private const double Tolerance = 1e-12;
    private const int Points = 40;

    /// <summary>The flat ones: vectors have tests of their own.</summary>
    public static TheoryData<string> Files => [.. Directory.GetFiles(Path.Combine(Repository.Root, "samples", "Tarnwater"), "*.cs")
        .Where(static file => File.ReadAllText(file) is var text
            && text.Contains("[OdeModel", StringComparison.Ordinal)
            && !text.Contains("Length = ", StringComparison.Ordinal))
        .Select(static file => Path.GetFileName(file)).Order()];

    [Theory]
    [MemberData(nameof(Files))]
    public void Jacobians_agree_with_dual_numbers_to_twelve_digits(string file)
    {
        (ModelDefinition model, IEmittedCalls calls) = Read(file);
        ExpressionGraph graph = new(model.Nodes);
        int[] rates = [.. model.States.Select(static state => state.Rate)];
        Random random = new(7);
        int compared = 0;
        for (int point = 0; point < Points; point++)
        {
            double[] state = [.. model.States.Select(item => Between(item.LowerBits, item.UpperBits, random))];
            double[] parameters = [.. model.Parameters.Select(item => Between(item.LowerBits, item.UpperBits, random))];
            double[] regime = calls.Regime(0, state, parameters);
            Interpreter values = new(graph, 0, state, parameters);
            compared += Compare(graph, values, rates, Operator.State, state.Length, calls.StateJacobian(0, state, parameters, regime));
            compared += Compare(graph, values, rates, Operator.Parameter, parameters.Length, calls.ParameterJacobian(0, state, parameters, regime));
        }

        Assert.True(compared >= Points * rates.Length, $"only {compared} entries compared");
    }

    [Theory]
    [MemberData(nameof(Files))]
    public void Generic_forms_at_double_equal_the_plain_ones_bit_for_bit(string file)
    {
        (ModelDefinition model, IEmittedCalls calls) = Read(file);
        Assert.True(calls.HasGenericForms);
        Random random = new(11);
        for (int point = 0; point < 500; point++)
        {
            double[] state = [.. model.States.Select(item => Between(item.LowerBits, item.UpperBits, random))];
            double[] parameters = [.. model.Parameters.Select(item => Between(item.LowerBits, item.UpperBits, random))];
            double[] regime = calls.Regime(0, state, parameters);
            ScalarDouble time = new(0);
            ScalarDouble[] x = [.. state.Select(ScalarDouble.Constant)], p = [.. parameters.Select(ScalarDouble.Constant)];
            Assert.Equal(Bits(calls.Rates(0, state, parameters)), Bits(calls.RatesOver(time, x, p)));
            Assert.Equal(Bits(calls.Rates(0, state, parameters, regime)), Bits(calls.RatesOver(time, x, p, regime)));
            Assert.Equal(Bits(calls.SwitchingFunctions(0, state, parameters, regime)), Bits(calls.SwitchingFunctionsOver(time, x, p, regime)));
        }
    }

    private static long[] Bits(double[] values) => [.. values.Select(BitConverter.DoubleToInt64Bits)];

    private static long[] Bits(ScalarDouble[] values) => [.. values.Select(static value => BitConverter.DoubleToInt64Bits(value.Value))];

    private static (ModelDefinition Model, IEmittedCalls Calls) Read(string file)
    {
        CSharpCompilation compilation = Compiling.Compile("global using System;", File.ReadAllText(Path.Combine(Repository.Root, "samples", "Tarnwater", file)));
        SyntaxTree tree = compilation.SyntaxTrees[1];
        ClassDeclarationSyntax declaration = tree.GetRoot().DescendantNodes().OfType<ClassDeclarationSyntax>().Single();
        INamedTypeSymbol symbol = compilation.GetSemanticModel(tree).GetDeclaredSymbol(declaration)!;
        ModelDefinition model = new ModelReader(symbol, declaration, compilation, CancellationToken.None).Read().Model!;
        // Where the harness declares its models.
        model = model with { Type = new("Models", model.Type.Types, "Models." + symbol.Name) };
        return (model, EmittedModel.Of(model).Calls);
    }

    private static int Compare(ExpressionGraph graph, Interpreter values, int[] rates, Operator leaf, int columns, double[] jacobian)
    {
        int compared = 0;
        for (int column = 0; column < columns; column++)
        {
            DualInterpreter dual = new(graph, values, node => node.Operator == leaf && node.Index == column ? 1 : 0);
            for (int row = 0; row < rates.Length; row++)
            {
                Tangent expected = dual[rates[row]];
                if (!double.IsFinite(values[rates[row]]) || !double.IsFinite(expected.Scale)) continue;
                double error = Math.Abs(jacobian[(row * columns) + column] - expected.Derivative);
                Assert.True(error <= Tolerance * expected.Scale, $"row {row}, {leaf} {column}: {jacobian[(row * columns) + column]:R} against {expected.Derivative:R}");
                compared++;
            }
        }

        return compared;
    }

    private static double Between(long lowerBits, long upperBits, Random random)
    {
        double lower = BitConverter.Int64BitsToDouble(lowerBits), upper = BitConverter.Int64BitsToDouble(upperBits);
        return lower + ((upper - lower) * random.NextDouble());
    }
}
