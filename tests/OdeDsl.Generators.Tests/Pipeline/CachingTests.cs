using System.Collections;
using System.Reflection;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Pipeline;

/// <summary>What an edit recomputes. The second file holds a constant of the model, the third has nothing to do with it.</summary>
public sealed class CachingTests
{
    private static readonly string Model = Marked.Equation("-Values.Gain * X + 0.5");
    private const string Values = "static class Values { public const double Gain = 0.0; }";
    private const string Unrelated = "class Unrelated { int A => 1; }";

    [Theory]
    [InlineData("an unrelated edit", 2, "A => 1", "A => 2", IncrementalStepRunReason.Cached, IncrementalStepRunReason.Cached)]
    [InlineData("a comment", 0, "using OdeDsl;", "using OdeDsl; // more\n// text\n", IncrementalStepRunReason.Cached, IncrementalStepRunReason.Cached)]
    [InlineData("white space in a formula", 0, "* X + 0.5", "  *  X+0.5", IncrementalStepRunReason.Modified, IncrementalStepRunReason.Modified)]
    [InlineData("a constant elsewhere", 1, "0.0", "2.5", IncrementalStepRunReason.Modified, IncrementalStepRunReason.Modified)]
    [InlineData("the sign of a zero", 1, "= 0.0", "= -0.0", IncrementalStepRunReason.Modified, IncrementalStepRunReason.Modified)]
    [InlineData("a formula", 0, "0.5", "0.75", IncrementalStepRunReason.Modified, IncrementalStepRunReason.Modified)]
    public void An_edit_recomputes_no_more_than_it_must(
        string edit, int file, string before, string after, IncrementalStepRunReason model, IncrementalStepRunReason output)
    {
        GeneratorRunResult result = Edit([Model, Values, Unrelated], file, before, after);
        Assert.True(model == ReasonOf(result, StepNames.Model), $"{edit}: model is {ReasonOf(result, StepNames.Model)}");
        Assert.True(output == OutputReasons(result).Single(), $"{edit}: output is {OutputReasons(result).Single()}");
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void An_edit_inside_one_model_writes_that_model_only(bool sameFile)
    {
        string first = Marked.Equation("X + 0.5"), second = Marked.Equation("2 * X").Replace("class Model", "class Other", StringComparison.Ordinal);
        string secondBody = second[second.IndexOf("[OdeModel]", StringComparison.Ordinal)..];
        GeneratorRunResult result = Edit(sameFile ? [first + secondBody] : [first, second], 0, "0.5", "0.75");
        IncrementalStepRunReason[] reasons = [.. OutputReasons(result).Order()];
        Assert.Equal([IncrementalStepRunReason.Modified, IncrementalStepRunReason.Cached], reasons);
    }

    [Fact]
    public void An_edit_that_moves_problems_only_leaves_the_text_alone()
    {
        GeneratorRunResult result = Edit([Marked.Equation("X + Y.Missing")], 0, "using OdeDsl;", "using OdeDsl;\n\n");
        Assert.Equal(IncrementalStepRunReason.Modified, ReasonOf(result, StepNames.Reading));
        Assert.Equal(IncrementalStepRunReason.Cached, ReasonOf(result, StepNames.Model));
        Assert.Contains(IncrementalStepRunReason.Cached, OutputReasons(result));
        Assert.Single(result.Diagnostics);
        int line = result.Diagnostics[0].Location.GetLineSpan().StartLinePosition.Line;
        Assert.Contains("Y.Missing", result.Diagnostics[0].Location.SourceTree!.GetText().Lines[line].ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void The_model_holds_no_object_of_the_compiler()
    {
        GeneratorRunResult result = Edit([Model, Values, Unrelated], 2, "A => 1", "A => 2");
        object[] models = [.. result.TrackedSteps[StepNames.Model].SelectMany(static step => step.Outputs).Select(static output => output.Value)];
        Assert.NotEmpty(models);
        Assert.All(models, static model => Assert.Null(CompilerObjectIn(model)));

        // The search must be able to find one: problems hold locations.
        ModelReading faulty = ModelText.Read(Marked.Equation("Missing"));
        Assert.NotNull(CompilerObjectIn(faulty));
    }

    [Fact]
    public void Equal_sources_give_equal_models_and_different_ones_do_not()
    {
        ModelDefinition first = ModelText.Read(Model, Values).Model!;
        Assert.Equal(first, ModelText.Read(Model, Values).Model);
        Assert.Equal(first.GetHashCode(), ModelText.Read(Model, Values).Model!.GetHashCode());
        Assert.NotEqual(first, ModelText.Read(Model, Values.Replace("0.0", "-0.0", StringComparison.Ordinal)).Model);
        Assert.NotEqual(first, ModelText.Read(Model.Replace("Initial = 1", "Initial = 1, Unit = \"m\"", StringComparison.Ordinal), Values).Model);
    }

    private static GeneratorRunResult Edit(string[] sources, int file, string before, string after)
    {
        CSharpCompilation compilation = Compiling.Compile(sources);
        GeneratorDriver driver = Compiling.Driver(trackSteps: true).RunGenerators(compilation);
        Assert.Contains(before, sources[file], StringComparison.Ordinal);
        SyntaxTree old = compilation.SyntaxTrees[file];
        SyntaxTree edited = CSharpSyntaxTree.ParseText(sources[file].Replace(before, after, StringComparison.Ordinal), Compiling.ParseOptions, old.FilePath);
        return driver.RunGenerators(compilation.ReplaceSyntaxTree(old, edited)).GetRunResult().Results.Single();
    }

    private static IncrementalStepRunReason ReasonOf(GeneratorRunResult result, string step) =>
        result.TrackedSteps[step].SelectMany(static run => run.Outputs).Single().Reason;

    private static IEnumerable<IncrementalStepRunReason> OutputReasons(GeneratorRunResult result) =>
        result.TrackedOutputSteps.SelectMany(static step => step.Value).SelectMany(static step => step.Outputs).Select(static output => output.Reason);

    private static object? CompilerObjectIn(object? value)
    {
        HashSet<object> seen = new(ReferenceEqualityComparer.Instance);
        return Search(value);

        object? Search(object? item)
        {
            if (item is null or string || item.GetType().IsPrimitive || item.GetType().IsEnum || !seen.Add(item)) return null;
            if (item is ISymbol or IOperation or SemanticModel or Compilation) return item;
            if (item is SyntaxNode or SyntaxTree or Location or Diagnostic) return item;
            if (item is IEnumerable items && item is Array) return items.Cast<object?>().Select(Search).FirstOrDefault(static found => found is not null);
            for (Type? type = item.GetType(); type is not null && type != typeof(object); type = type.BaseType)
            {
                foreach (FieldInfo field in type.GetFields(BindingFlags.Instance | BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.DeclaredOnly))
                {
                    if (Search(field.GetValue(item)) is { } found) return found;
                }
            }

            return null;
        }
    }
}
