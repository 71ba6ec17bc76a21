using System;
using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>
/// Prints the body of one member of a model with vectors: loops over the elements of each segment, with everything that stays the same
/// computed outside of them, and neighbours read from slices that begin where the loop does, so that no element is checked for being inside.
/// </summary>
internal sealed class LoopBodyWriter
{
    private readonly SourceWriter _writer;
    private readonly ModelDefinition _model;
    private readonly VectorPart _vectors;
    private readonly ExpressionGraph _graph;
    private readonly LoopPlan _plan;
    private readonly FreeSymbols _symbols;
    private readonly NameScope _names;
    private readonly CancellationToken _cancellation;
    private readonly IReadOnlyList<RowGroup> _switches;
    private readonly Dictionary<int, string> _symbolNames = [];
    private readonly Dictionary<int, string> _counters = [];
    private readonly Dictionary<int, string> _known = [];
    private readonly Dictionary<int, string> _slices = [];
    private readonly ExpressionPrinter _printer;

    public LoopBodyWriter(
        SourceWriter writer,
        VectorEquations equations,
        ExpressionGraph graph,
        FreeSymbols symbols,
        NameScope names,
        IReadOnlyList<(int Node, int Loop)> results,
        CancellationToken cancellation)
    {
        _writer = writer;
        _model = equations.Model;
        _vectors = equations.Model.Vectors!;
        _switches = equations.Switches;
        _graph = graph;
        _symbols = symbols;
        _names = names;
        _cancellation = cancellation;
        _plan = new(graph, symbols, results);
        _printer = new(graph, _known, Leaf, [.. equations.Model.Tables.Select(static table => table.Access)]);
        Layout = new(equations.Model, _symbolNames);
    }

    public VectorLayout Layout { get; }

    /// <summary>Prints the lengths that everything below may need.</summary>
    public void WriteLengths()
    {
        for (int symbol = 0; symbol < _vectors.Symbols.Count; symbol++)
        {
            SymbolDefinition length = _vectors.Symbols[symbol];
            if (!length.IsLength) continue;
            _symbolNames[symbol] = Identifiers.Escape(_names.Claim(Identifiers.Local(length.Name)));
            _writer.Line($"int {_symbolNames[symbol]} = (int)parameters[{Literals.Integer(length.Parameter)}];");
        }
    }

    public string Claim(string wanted) => Identifiers.Escape(_names.Claim(wanted));

    /// <summary>The text of a value to deliver.</summary>
    public string Text(int node) => _printer.PrintResult(node);

    /// <summary>Prints the rows group by group, in loops; neighbouring groups with the same outer range share its loop.</summary>
    /// <param name="results">What a group delivers.</param>
    /// <param name="row">Prints the delivery of one row.</param>
    /// <param name="prepare">Prints what stands before the innermost loop of a group, given the number of passes.</param>
    public void WriteRows(
        IReadOnlyList<RowGroup> groups, Func<RowGroup, IEnumerable<int>> results, Action<RowGroup> row, Action<RowGroup, string>? prepare = null)
    {
        for (int i = 0; i < groups.Count;)
        {
            _cancellation.ThrowIfCancellationRequested();
            RowGroup first = groups[i];
            RowGroup[] together = [.. groups.Skip(i).TakeWhile(group => ReferenceEquals(group, first) || ShareOuter(group, first))];
            if (i == 0 || groups[i - 1].Text != first.Text) _writer.Line("// " + Literals.Comment(first.Text));
            WriteNamed(-1, together.SelectMany(results));
            if (first.Ranges.Count == 2 && first.Ranges[0].Symbol >= 0)
            {
                int outer = first.Ranges[0].Symbol;
                OpenLoop(outer, together.SelectMany(results));
                foreach (RowGroup group in together) WriteInner(group, results(group), row, prepare);
                CloseLoop(outer);
            }
            else
            {
                foreach (RowGroup group in together) WriteInner(group, results(group), row, prepare);
            }

            i += together.Length;
        }
    }

    private static bool ShareOuter(RowGroup a, RowGroup b) =>
        a.Vector >= 0 && a.Vector == b.Vector && a.Ranges.Count == 2 && a.Ranges[0].Symbol >= 0 && a.Ranges[0] == b.Ranges[0];

    private void WriteInner(RowGroup group, IEnumerable<int> results, Action<RowGroup> row, Action<RowGroup, string>? prepare)
    {
        int inner = group.Ranges.Count == 0 ? -1 : group.Ranges[group.Ranges.Count - 1].Symbol;
        if (inner < 0)
        {
            row(group);
            return;
        }

        OpenLoop(inner, results, count => prepare?.Invoke(group, count));
        row(group);
        CloseLoop(inner);
    }

    /// <summary>Opens a loop over an index and prints what is named directly in it.</summary>
    public void OpenLoop(int symbol, IEnumerable<int> results, Action<string>? prepare = null)
    {
        SymbolDefinition index = _vectors.Symbols[symbol];
        int[] all = [.. results];
        int[] reached = [.. Reach.Of(_graph, all).Where(node => _symbols.Innermost(node) == symbol)];
        string count = Layout.Text(index.Upper - index.Lower);
        if (count.IndexOf(' ') >= 0)
        {
            string local = Claim("count");
            _writer.Line($"int {local} = {count};");
            count = local;
        }

        prepare?.Invoke(count);
        foreach (int access in reached.Where(node => IsSliced(_graph[node], symbol))) WriteSlice(access, symbol, count);
        string lower = Layout.Text(index.Lower);
        string name = Claim(Identifiers.Local(index.Name));
        string counter = lower == "0" ? name : Claim("k");
        _counters[symbol] = counter;
        _symbolNames[symbol] = lower != "0" && !NeedsIndex(reached, symbol) ? $"({counter} + {lower})" : name;
        _writer.Open($"for (int {counter} = 0; {counter} < {count}; {counter}++)");
        if (_symbolNames[symbol] == name && lower != "0") _writer.Line($"int {name} = {counter} + {lower};");
        WriteNamed(symbol, all);
    }

    private bool NeedsIndex(IEnumerable<int> reached, int symbol) => reached.Any(node =>
        _graph[node].Operator == Operator.IndexNumber || (IsElement(_graph[node]) && !IsSliced(_graph[node], symbol)));

    /// <summary>Closes a loop; what was named in it has no name any more.</summary>
    public void CloseLoop(int symbol)
    {
        _writer.Close();
        foreach (int node in _known.Keys.Where(node => _plan.LoopOf(node) == symbol).ToArray()) _known.Remove(node);
        foreach (int node in _slices.Keys.Where(node => _plan.LoopOf(node) == symbol).ToArray()) _slices.Remove(node);
    }

    /// <summary>Names what stands directly in a loop and is not named yet.</summary>
    public void WriteNamed(int loop, IEnumerable<int> results)
    {
        foreach (int node in _plan.NamedIn(loop, results))
        {
            if (_known.ContainsKey(node)) continue;
            if (_graph[node].Operator is Operator.Fold or Operator.Sum) WriteSum(node);
            else WriteLocal(node);
        }
    }

    private void WriteLocal(int node)
    {
        Node value = _graph[node];
        string wanted = value.Operator switch
        {
            Operator.State => Identifiers.Local(_model.States[value.Index].Property.Name),
            Operator.Parameter => Identifiers.Local(_model.Parameters[value.Index].Property.Name) + (_model.Parameters[value.Index].IsWhole ? "Number" : ""),
            Operator.Direction => Identifiers.Local(_model.States[value.Index].Property.Name) + "Direction",
            _ => "v" + Literals.Integer(_known.Count + 1),
        };
        string definition = _printer.PrintDefinition(node);
        _known[node] = Claim(wanted);
        _writer.Line($"{(_graph.IsCondition(node) ? "bool" : "double")} {_known[node]} = {definition};");
    }

    private void WriteSum(int node)
    {
        Node sum = _graph[node];
        bool isFold = sum.Operator == Operator.Fold;
        int body = isFold ? sum.Second : sum.First;
        string name = Claim("sum");
        _writer.Line($"double {name} = {(isFold ? _printer.Print(sum.First) : "0d")};");
        int accumulator = isFold ? _graph.Intern(new Node(Operator.Accumulator, -1, -1, -1, sum.Payload)) : -1;
        if (isFold) _known[accumulator] = name;
        OpenLoop(sum.Symbol, [body]);
        _writer.Line($"{name} {(isFold ? "=" : "+=")} {_printer.Print(body)};");
        CloseLoop(sum.Symbol);
        _known[node] = name;
    }

    private static bool IsElement(Node node) =>
        node.Operator is Operator.StateElement or Operator.ParameterElement or Operator.DirectionElement;

    /// <summary>Whether successive passes of a loop read successive elements.</summary>
    private bool IsSliced(Node node, int symbol)
    {
        if (!IsElement(node)) return false;
        EquatableArray<Affine> indices = _vectors.Accesses[node.Index].Indices;
        return indices[indices.Count - 1].FactorOf(symbol) == 1 && indices.Take(indices.Count - 1).All(index => index.FactorOf(symbol) == 0);
    }

    private void WriteSlice(int node, int symbol, string count)
    {
        Node element = _graph[node];
        AccessDefinition access = _vectors.Accesses[element.Index];
        bool isParameter = element.Operator == Operator.ParameterElement;
        string vector = isParameter ? _vectors.Parameters[access.Vector].Property.Name : _vectors.States[access.Vector].Property.Name;
        string side = element.Operator == Operator.DirectionElement ? "Direction" : "";
        foreach (Affine index in access.Indices)
        {
            if (index.Terms.Count == 1 && index.Constant != 0)
                side += (index.Constant < 0 ? "Minus" : "Plus") + Literals.Integer((int)Math.Abs(index.Constant));
        }

        _slices[node] = Claim(Identifiers.Local(vector) + side);
        Affine[] start = [.. access.Indices.Select(index => index.Without(symbol) + _vectors.Symbols[symbol].Lower.Times(index.FactorOf(symbol)))];
        _writer.Line($"global::System.ReadOnlySpan<double> {_slices[node]} = {Source(element)}.Slice({Layout.Place(isParameter, access.Vector, start)}, {count});");
    }

    private static string Source(Node element) => element.Operator switch
    {
        Operator.ParameterElement => "parameters",
        Operator.DirectionElement => "direction",
        _ => "state",
    };

    private string Leaf(Node node)
    {
        switch (node.Operator)
        {
            case Operator.StateElement or Operator.ParameterElement or Operator.DirectionElement:
                int index = _graph.Intern(node);
                if (_slices.TryGetValue(index, out string? slice)) return $"{slice}[{_counters[_plan.LoopOf(index)]}]";
                AccessDefinition access = _vectors.Accesses[node.Index];
                return $"{Source(node)}[{Layout.Place(node.Operator == Operator.ParameterElement, access.Vector, access.Indices)}]";
            case Operator.IndexNumber:
                string text = Layout.Text(_vectors.Numbers[node.Index]);
                return text.IndexOf(' ') < 0 ? "(double)" + text : $"(double)({text})";
            case Operator.Side:
                return $"regime[{SwitchPlace(_switches[node.Index])}] == 1d";
            case Operator.WholeNumber:
                return $"regime[{SwitchPlace(_switches[node.Index])}]";
            default:
                return ModelNames.Access(node);
        }
    }

    /// <summary>The entry of a sparse row at an element, behind the columns before it.</summary>
    public string Offset(ElementEntry entry, bool isParameter)
    {
        AccessDefinition access = _vectors.Accesses[entry.Access];
        return Layout.Offset(access.Indices, Layout.LengthsOf(isParameter, access.Vector));
    }

    /// <summary>The column of an element.</summary>
    public string Column(ElementEntry entry, bool isParameter)
    {
        AccessDefinition access = _vectors.Accesses[entry.Access];
        return Layout.Place(isParameter, access.Vector, access.Indices);
    }

    /// <summary>Where the regime entry of a switching function lies, inside the loops it depends on.</summary>
    public string SwitchPlace(RowGroup group)
    {
        string offset = "0";
        foreach (IndexRange range in group.Ranges)
            offset = VectorLayout.Plus(VectorLayout.Times(offset, Layout.Text(range.Upper - range.Lower)), _counters[range.Symbol]);
        return VectorLayout.Plus(SwitchStart(group.Index), offset);
    }

    /// <summary>Where the entries of a family of switching functions begin.</summary>
    public string SwitchStart(int family) => VectorLayout.Sum(0, _switches.Take(family).Select(Layout.Count));

    /// <summary>The place within a slice of the innermost loop of a group.</summary>
    public string Counter(RowGroup group) => _counters[group.Ranges[group.Ranges.Count - 1].Symbol];

    /// <summary>Where a row lies among all rates.</summary>
    public string RowPlace(RowGroup group) => group.Vector < 0
        ? Literals.Integer(group.Index)
        : Layout.Place(false, group.Vector, [.. group.Ranges.Select(SplitSet.IndexOn)]);

    /// <summary>Where the first row of a group's innermost loop lies.</summary>
    public string FirstPlace(RowGroup group) => Layout.Place(
        false, group.Vector, [.. group.Ranges.Select((range, i) => i == group.Ranges.Count - 1 ? range.Lower : SplitSet.IndexOn(range))]);
}
