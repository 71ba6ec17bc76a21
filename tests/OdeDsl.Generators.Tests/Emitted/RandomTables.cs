using System.Globalization;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The tables that random models read: each interpolation and extrapolation, knots evenly spaced and not.</summary>
internal static class RandomTables
{
    private static readonly double[][] Knots = [[-1.5, -0.25, 0.125, 1, 2.5], [-2, -1, 0, 1, 2], [-0.75, 1.25]];
    private static readonly double[][] Values = [[2, -1, 0.5, 0.75, -3], [-1, -0.5, 1.5, 1.75, 4], [0.3, -0.9]];

    public static readonly Table[] All = [.. Enumerable.Range(0, 6).Select(static i => new Table(
        Knots[i % 3], Values[i % 3], (Interpolation)(i % 2), (Extrapolation)(i / 2)))];

    public static EquatableArray<TableDefinition> Definitions(string model) =>
        new([.. All.Select((_, i) => new TableDefinition("RandomTable" + i, "m", "", $"global::Models.{model}.RandomTable{i}"))]);

    /// <summary>The declaration a user would have written.</summary>
    public static string Declaration(string name, int index) =>
        $"[OdeDsl.Table] private static readonly OdeDsl.Table {name} = new([{Join(All[index].Knots)}], [{Join(All[index].Values)}], "
        + $"OdeDsl.Interpolation.{All[index].Interpolation}, OdeDsl.Extrapolation.{All[index].Extrapolation});\n";

    private static string Join(ReadOnlySpan<double> numbers) =>
        string.Join(", ", numbers.ToArray().Select(static number => number.ToString("R", CultureInfo.InvariantCulture)));
}
