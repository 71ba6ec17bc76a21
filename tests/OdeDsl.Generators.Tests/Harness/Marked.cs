using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Text;

namespace OdeDsl.Generators.Tests.Harness;

/// <summary>Sources in which <c>[|</c> and <c>|]</c> mark where a problem must be reported.</summary>
internal static class Marked
{
    private const string Opening = "[|";
    private const string Closing = "|]";

    /// <summary>A model with two states and a parameter; <paramref name="members"/> must hold the rate of X.</summary>
    public static string Model(string members) => $$"""
        using System;
        using OdeDsl;
        [OdeModel]
        public sealed partial class Model
        {
            [State(Initial = 1)] public partial double X { get; set; }
            [State] public partial double Y { get; set; }
            [Parameter(2)] public partial double P { get; set; }
            [Rate(nameof(Y))] double YRate => X;
            {{members}}
        }
        """;

    /// <summary>That model with X' = <paramref name="expression"/>.</summary>
    public static string Equation(string expression) => Model($"[Rate(nameof(X))] double XRate => {expression};");

    /// <summary>That model with a rate of X whose statements these are.</summary>
    public static string Body(string statements) => Model($$"""[Rate(nameof(X))] double XRate(double time) { {{statements}} }""");

    /// <summary>Runs the generator on marked sources and expects one problem, with that id, at the mark.</summary>
    public static Diagnostic ExpectOne(string id, params string[] marked)
    {
        int file = Array.FindIndex(marked, static source => source.Contains(Opening, StringComparison.Ordinal));
        Assert.True(file >= 0, "No mark in the source.");
        int start = marked[file].IndexOf(Opening, StringComparison.Ordinal);
        int end = marked[file].IndexOf(Closing, StringComparison.Ordinal) - Opening.Length;
        string[] sources = [.. marked.Select(Unmarked)];

        GeneratorRun run = Compiling.Run(sources);
        Diagnostic problem = Assert.Single(run.Problems);
        Assert.Equal(id, problem.Id);
        Assert.Equal($"/consumer/Source{file}.cs", problem.Location.SourceTree?.FilePath);
        TextSpan place = problem.Location.SourceSpan;
        Assert.Equal(sources[file][start..end], sources[file].Substring(place.Start, place.Length));
        Assert.Equal(start, place.Start);
        return problem;
    }

    private static string Unmarked(string source) =>
        source.Replace(Opening, "", StringComparison.Ordinal).Replace(Closing, "", StringComparison.Ordinal);
}
