using System;
using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the nested struct with the equations of a model with vectors.</summary>
internal sealed class VectorEquationsWriter(SourceWriter writer, VectorEquations equations, CancellationToken cancellationToken)
{
    private const string Place = "place";

    private static readonly string[] Point = ["state", "parameters"];
    private static readonly string[] LockedPoint = ["state", "parameters", "regime"];

    private readonly FreeSymbols _freeSymbols = new(equations.Model.Vectors!, equations.Free);

    public void Write(string name)
    {
        writer.Line("/// <summary>The equations of the model over flat vectors.</summary>");
        writer.Line(GeneratedMark.Code);
        writer.Line(GeneratedMark.NotCovered);
        writer.Open($"public readonly struct {name} : global::OdeDsl.Modeling.IOdeSystem");
        new VectorDescriptionWriter(writer, equations, cancellationToken).Write();
        IReadOnlyList<RowGroup> rates = equations.Rates, switches = equations.Switches;
        Vector("Rates", Point, "rates", rates, [.. rates.Select(static group => group.Free)], isFree: true);
        if (switches.Count > 0) Vector("Rates", LockedPoint, "rates", rates, [.. rates.Select(static group => group.Locked)]);
        else WriteUnlockedRates();
        Matrix("StateJacobian", rates, Operator.StateElement);
        MatrixValues("StateJacobianValues", Operator.StateElement);
        Matrix("ParameterJacobian", rates, Operator.ParameterElement);
        MatrixValues("ParameterJacobianValues", Operator.ParameterElement);
        Vector("TimeDerivative", LockedPoint, "derivative", rates, [.. rates.Select(group => equations.ByTime(group, cancellationToken))]);
        Vector(
            "JacobianVectorProduct", [.. LockedPoint, "direction"], "product", rates, equations.AlongDirection(rates, cancellationToken));
        Observables();
        Vector("SwitchingFunctions", LockedPoint, "values", switches, [.. switches.Select(static group => group.Locked)]);
        Matrix("SwitchingJacobian", switches, Operator.StateElement);
        Vector("SwitchingTimeDerivative", LockedPoint, "derivative", switches, [.. switches.Select(group => equations.ByTime(group, cancellationToken))]);
        Vector("Regime", Point, "regime", switches, [.. switches.Select(static group => group.Free)], isFree: true);
        writer.Close();
    }

    private void WriteUnlockedRates()
    {
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Line("/// <remarks>No condition of this model changes during a run: the regime is empty and not read.</remarks>");
        writer.Line($"public static void Rates({Parameters(LockedPoint, "rates")}) => Rates(time, state, parameters, rates);");
    }

    private LoopBodyWriter Open(
        string method, IReadOnlyList<string> inputs, string target, bool isFree, IReadOnlyList<(int Node, int Loop)> results)
    {
        cancellationToken.ThrowIfCancellationRequested();
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Open($"public static void {method}({Parameters(inputs, target)})");
        LoopBodyWriter body = new(
            writer,
            equations,
            isFree ? equations.Free : equations.Locked,
            isFree ? _freeSymbols : equations.Symbols,
            ModelNames.NewScopeOfArguments(),
            results,
            cancellationToken);
        body.WriteLengths();
        // The error for a vector too short, before anything is written.
        writer.Line($"state = state[..{Range(body.Layout.StateCount)}];");
        if (inputs.Contains("direction")) writer.Line($"direction = direction[..{Range(body.Layout.StateCount)}];");
        return body;
    }

    private static string Parameters(IReadOnlyList<string> inputs, string target) =>
        Signatures.Parameters(new Quantity("", inputs, target, 0, null!, []));

    /// <summary>A vector with a value for each row.</summary>
    private void Vector(
        string method, IReadOnlyList<string> inputs, string target, IReadOnlyList<RowGroup> groups, IReadOnlyList<int> nodes, bool isFree = false)
    {
        Dictionary<RowGroup, int> nodeOf = [];
        for (int i = 0; i < groups.Count; i++) nodeOf.Add(groups[i], nodes[i]);
        LoopBodyWriter body = Open(method, inputs, target, isFree, [.. groups.Select(group => (nodeOf[group], InnermostLoop(group)))]);
        bool areRates = ReferenceEquals(groups, equations.Rates);
        writer.Line($"{target} = {target}[..{Range(areRates ? body.Layout.StateCount : body.SwitchStart(groups.Count))}];");
        RowGroup[] written = [.. groups.Where(group => isFree || !IsZero(nodeOf[group]))];
        if (written.Length < groups.Count) writer.Line($"{target}.Clear();");
        Dictionary<RowGroup, string> slices = [];
        body.WriteRows(
            written,
            group => [nodeOf[group]],
            group => writer.Line(slices.TryGetValue(group, out string? slice)
                ? $"{slice}[{body.Counter(group)}] = {body.Text(nodeOf[group])};"
                : $"{target}[{(areRates ? body.RowPlace(group) : body.SwitchPlace(group))}] = {body.Text(nodeOf[group])};"),
            (group, count) =>
            {
                if (!areRates) return;
                slices[group] = body.Claim(Identifiers.Local(NameOf(group)) + Identifiers.Part(target));
                writer.Line($"global::System.Span<double> {slices[group]} = {target}.Slice({body.FirstPlace(group)}, {count});");
            });
        writer.Close();
    }

    private void Observables()
    {
        IReadOnlyList<int> nodes = equations.Observables;
        LoopBodyWriter body = Open("Observables", Point, "values", isFree: true, [.. nodes.Select(static node => (node, -1))]);
        writer.Line($"values = values[..{Literals.Integer(nodes.Count)}];");
        for (int i = 0; i < nodes.Count; i++)
        {
            ObservableDefinition observable = equations.Model.Observables[i];
            writer.Line("// " + Literals.Comment($"{observable.Name}: {observable.Text}"));
            body.WriteNamed(-1, [nodes[i]]);
            writer.Line($"values[{Literals.Integer(i)}] = {body.Text(nodes[i])};");
        }

        writer.Close();
    }

    /// <summary>Only the entries of a matrix that are not zero everywhere, row by row.</summary>
    private void MatrixValues(string method, Operator element)
    {
        bool isParameter = element == Operator.ParameterElement;
        Dictionary<RowGroup, JacobianRow> rows = Rows(equations.Rates, element);
        LoopBodyWriter body = Open(method, LockedPoint, "values", isFree: false, Results(rows));
        string place = body.Claim(Place);
        if (rows.Values.Any(HasEntries)) writer.Line($"int {place} = 0;");
        body.WriteRows(equations.Rates, group => NodesOf(rows[group]), group =>
        {
            JacobianRow row = rows[group];
            if (row.Vectors.Any(static vector => vector.IsDense)) WriteWideRow(body, row, place, isParameter);
            else WriteNarrowRow(body, row, place);
        });
        writer.Close();
    }

    private void WriteNarrowRow(LoopBodyWriter body, JacobianRow row, string place)
    {
        int[] nodes = [.. row.Scalars.Select(static entry => entry.Node).Concat(row.Vectors.SelectMany(static vector => vector.Entries).Select(static entry => entry.Node))];
        for (int i = 0; i < nodes.Length; i++)
            writer.Line($"values[{VectorLayout.Plus(place, Literals.Integer(i))}] = {body.Text(nodes[i])};");
        if (nodes.Length > 0) writer.Line($"{place} += {Literals.Integer(nodes.Length)};");
    }

    /// <summary>A row that sums over vectors: entries are added up in place.</summary>
    private void WriteWideRow(LoopBodyWriter body, JacobianRow row, string place, bool isParameter)
    {
        string name = body.Claim("row");
        string count = VectorDescriptionWriter.EntryCount(body.Layout, row, isParameter);
        writer.Line($"global::System.Span<double> {name} = values.Slice({place}, {count});");
        writer.Line($"{name}.Clear();");
        for (int i = 0; i < row.Scalars.Count; i++) writer.Line($"{name}[{Literals.Integer(i)}] = {body.Text(row.Scalars[i].Node)};");
        string start = Literals.Integer(row.Scalars.Count);
        foreach (VectorColumns vector in row.Vectors)
        {
            for (int i = 0; i < vector.Entries.Count; i++)
            {
                ElementEntry entry = vector.Entries[i];
                string at = start;
                int position = i;
                WriteEntry(body, entry, () =>
                    $"{name}[{VectorLayout.Plus(at, vector.IsDense ? body.Offset(entry, isParameter) : Literals.Integer(position))}]");
            }

            string length = vector.IsDense ? body.Layout.Count(body.Layout.LengthsOf(isParameter, vector.Vector)) : Literals.Integer(vector.Entries.Count);
            start = VectorLayout.Plus(start, length);
        }

        writer.Line($"{place} += {count};");
    }

    /// <summary>Adds an entry to its place, inside the loops in which it appears.</summary>
    private void WriteEntry(LoopBodyWriter body, ElementEntry entry, Func<string> place)
    {
        string factor = "";
        for (int i = 0; i < entry.Loops.Count; i++)
        {
            (int symbol, int node) = entry.Loops[i];
            string outer = body.Claim("factor");
            writer.Line($"double {outer} = {(factor.Length == 0 ? "" : factor + " * ")}{Factor(body, node)};");
            factor = outer;
            body.OpenLoop(symbol, i + 1 < entry.Loops.Count ? [.. entry.Loops.Skip(i + 1).Select(static loop => loop.Factor), entry.Node] : [entry.Node]);
        }

        writer.Line($"{place()} += {(factor.Length == 0 ? body.Text(entry.Node) : factor + " * " + Factor(body, entry.Node))};");
        foreach ((int symbol, int _) in entry.Loops.Reverse()) body.CloseLoop(symbol);
    }

    private static string Factor(LoopBodyWriter body, int node)
    {
        string text = body.Text(node);
        return text.IndexOf(' ') < 0 && text[0] != '-' ? text : "(" + text + ")";
    }

    /// <summary>A whole matrix by rows.</summary>
    private void Matrix(string method, IReadOnlyList<RowGroup> groups, Operator element)
    {
        bool isParameter = element == Operator.ParameterElement, areRates = ReferenceEquals(groups, equations.Rates);
        Dictionary<RowGroup, JacobianRow> rows = Rows(groups, element);
        LoopBodyWriter body = Open(method, LockedPoint, "jacobian", isFree: false, Results(rows));
        string width = isParameter ? body.Layout.ParameterCount : body.Layout.StateCount;
        string columns = width;
        RowGroup[] written = [.. groups.Where(group => HasEntries(rows[group]))];
        if (written.Length > 0 && !int.TryParse(width, out int _))
        {
            columns = body.Claim("width");
            writer.Line($"int {columns} = {width};");
        }

        string height = areRates ? body.Layout.StateCount : body.SwitchStart(groups.Count);
        writer.Line($"jacobian = jacobian[..{Range(VectorLayout.Times(height, columns))}];");
        writer.Line("jacobian.Clear();");
        body.WriteRows(written, group => NodesOf(rows[group]), group =>
        {
            string row = body.Claim("row");
            string place = areRates ? body.RowPlace(group) : body.SwitchPlace(group);
            writer.Line($"global::System.Span<double> {row} = jacobian.Slice({VectorLayout.Times(place, columns)}, {columns});");
            foreach ((int column, int node) in rows[group].Scalars) writer.Line($"{row}[{Literals.Integer(column)}] = {body.Text(node)};");
            foreach (ElementEntry entry in rows[group].Vectors.SelectMany(static vector => vector.Entries))
                WriteEntry(body, entry, () => $"{row}[{body.Column(entry, isParameter)}]");
        });
        writer.Close();
    }

    private static bool HasEntries(JacobianRow row) => row.Scalars.Count + row.Vectors.Count > 0;

    private Dictionary<RowGroup, JacobianRow> Rows(IReadOnlyList<RowGroup> groups, Operator element) =>
        groups.ToDictionary(static group => group, group => equations.Row(group, element, cancellationToken));

    private static (int Node, int Loop)[] Results(Dictionary<RowGroup, JacobianRow> rows) =>
        [.. rows.SelectMany(static pair => ResultsOf(pair.Value, InnermostLoop(pair.Key)))];

    private static IEnumerable<(int Node, int Loop)> ResultsOf(JacobianRow row, int loop)
    {
        foreach ((int _, int node) in row.Scalars) yield return (node, loop);
        foreach (ElementEntry entry in row.Vectors.SelectMany(static vector => vector.Entries))
        {
            int around = loop;
            foreach ((int symbol, int factor) in entry.Loops)
            {
                yield return (factor, around);
                around = symbol;
            }

            yield return (entry.Node, around);
        }
    }

    private static IEnumerable<int> NodesOf(JacobianRow row) => ResultsOf(row, -1).Select(static result => result.Node);

    private static int InnermostLoop(RowGroup group) => group.Ranges.Select(static range => range.Symbol).DefaultIfEmpty(-1).Max();

    private string NameOf(RowGroup group) => equations.Model.Vectors!.States[group.Vector].Property.Name;

    private bool IsZero(int node) => equations.Locked[node] is { Operator: Operator.Constant, Constant: 0.0 };

    /// <summary>The end of a range, in parentheses if it is a sum.</summary>
    private static string Range(string end) => end.IndexOf(' ') < 0 ? end : "(" + end + ")";
}
