using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the elimination of a small sparse matrix line by line, and the substitutions that solve with its factors.</summary>
internal sealed class EliminationWriter(SourceWriter writer, ModelDefinition model, Elimination elimination)
{
    /// <summary>Operations of a method; the generic operators in it must all be inlined.</summary>
    private const int LargestOperationCount = 100;

    private const string Constraint = " where TElement : struct, global::OdeDsl.LinearAlgebra.IMatrixElement<TElement>";
    private const string EliminateParameters = "(global::System.Span<TElement> entries, global::System.Span<double> growth)";
    private const string SubstituteParameters = "(global::System.ReadOnlySpan<TElement> factors, global::System.Span<TElement> vector)";

    private readonly int _size = elimination.DiagonalPlaces.Count;

    public void Write()
    {
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Line($"public static global::OdeDsl.LinearAlgebra.UnrolledLayout? Unrolled {{ get; }} = new({Literals.Integer(elimination.Length)}, "
            + $"[{string.Join(", ", elimination.DiagonalPlaces.Select(Literals.Integer))}]);");
        Member("Eliminate", EliminateParameters, "(entries, growth)", [
            $"entries = entries[..{Literals.Integer(elimination.Length)}];",
            $"growth = growth[..{Literals.Integer(2 * _size)}];"], Eliminate());
        Member("Substitute", SubstituteParameters, "(factors, vector)", [
            $"factors = factors[..{Literals.Integer(elimination.Length)}];",
            $"vector = vector[..{Literals.Integer(_size)}];"], Substitute());
    }

    /// <summary>A member as one method, or as calls to parts.</summary>
    private void Member(string name, string parameters, string arguments, IReadOnlyList<string> slices, IEnumerable<Block> blocks)
    {
        List<List<Block>> parts = [];
        int operations = 0;
        foreach (Block block in blocks)
        {
            operations += block.OperationCount;
            if (parts.Count == 0 || operations > LargestOperationCount)
            {
                parts.Add([]);
                operations = block.OperationCount;
            }

            parts[parts.Count - 1].Add(block);
        }

        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Open($"public static void {name}<TElement>{parameters}{Constraint}");
        if (parts.Count == 1) Lines(slices, parts[0]);
        else for (int i = 0; i < parts.Count; i++) writer.Line($"{name}Part{Literals.Integer(i + 1)}{arguments};");
        writer.Close();
        for (int i = 0; i < parts.Count && parts.Count > 1; i++)
        {
            writer.Line();
            writer.Open($"private static void {name}Part{Literals.Integer(i + 1)}<TElement>{parameters}{Constraint}");
            Lines(slices, parts[i]);
            writer.Close();
        }
    }

    private void Lines(IReadOnlyList<string> slices, IEnumerable<Block> blocks)
    {
        foreach (string line in slices.Concat(blocks.SelectMany(static block => block.Lines))) writer.Line(line);
    }

    private IEnumerable<Block> Eliminate()
    {
        int factors = 0;
        foreach (PivotStep step in elimination.Pivots)
        {
            int diagonal = elimination.DiagonalPlaces[step.Row];
            string size = string.Join(" + ", step.Right.Select(static entry => entry.Place).Prepend(diagonal).Select(
                static place => $"TElement.Size({Entry(place)})"));
            string rowSize = $"growth[{Literals.Integer(_size + step.Row)}]";
            yield return new Block(step.Right.Count + 3,
            [
                "// Pivot: " + model.States[step.Row].Property.Name,
                $"{rowSize} = {size};",
                $"{Growth(step.Row)} += {rowSize};",
                $"{Entry(diagonal)} = TElement.Inverse({Entry(diagonal)});",
            ]);
            foreach (RowUpdate update in step.Updates)
            {
                string factor = "l" + Literals.Integer(++factors);
                yield return new Block(3 + (2 * update.Entries.Count),
                [
                    $"TElement {factor} = {Entry(update.Multiplier)} * {Entry(diagonal)};",
                    $"{Entry(update.Multiplier)} = {factor};",
                    $"{Growth(update.Row)} += TElement.Size({factor}) * {rowSize};",
                    .. update.Entries.Select(entry => $"{Entry(entry.Target)} -= {factor} * {Entry(entry.Source)};"),
                ]);
            }
        }
    }

    private IEnumerable<Block> Substitute()
    {
        ILookup<int, MatrixPlace> left = elimination.Pivots
            .SelectMany(static step => step.Updates.Select(update => (update.Row, Place: new MatrixPlace(step.Row, update.Multiplier))))
            .ToLookup(static item => item.Row, static item => item.Place);
        foreach (PivotStep step in elimination.Pivots.Where(step => left.Contains(step.Row)))
            yield return new Block(2 * left[step.Row].Count(), [$"{Vector(step.Row)} = {Difference(step.Row, left[step.Row])};"]);
        foreach (PivotStep step in elimination.Pivots.Reverse())
        {
            string rest = step.Right.Count == 0 ? Vector(step.Row) : "(" + Difference(step.Row, step.Right) + ")";
            string inverse = $"factors[{Literals.Integer(elimination.DiagonalPlaces[step.Row])}]";
            yield return new Block(1 + (2 * step.Right.Count), [$"{Vector(step.Row)} = {rest} * {inverse};"]);
        }
    }

    private static string Difference(int row, IEnumerable<MatrixPlace> entries) => string.Join(" - ", entries
        .Select(static entry => $"factors[{Literals.Integer(entry.Place)}] * {Vector(entry.Column)}").Prepend(Vector(row)));

    private static string Entry(int place) => $"entries[{Literals.Integer(place)}]";

    private static string Growth(int row) => $"growth[{Literals.Integer(row)}]";

    private static string Vector(int row) => $"vector[{Literals.Integer(row)}]";

    /// <summary>Lines that stay in one method.</summary>
    private sealed record Block(int OperationCount, string[] Lines);
}
