using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>Rows that have one formula: a single state, a segment of a vector, or the switching functions of one kind.</summary>
/// <param name="Vector">The vector they belong to, or -1.</param>
/// <param name="Index">The position of a single row, or the number of the family of switching functions.</param>
/// <param name="Ranges">Empty for a single row.</param>
/// <param name="Free">The formula as written, a node of the free graph.</param>
/// <param name="Locked">The locked formula.</param>
/// <param name="Text">What the user calls it.</param>
internal sealed record RowGroup(int Vector, int Index, EquatableArray<IndexRange> Ranges, int Free, int Locked, string Text);

/// <summary>What is computed for a model with vectors, as expressions; see <see cref="ModelEquations"/> for models without.</summary>
internal sealed class VectorEquations
{
    private readonly Differentiator _differentiator;

    private VectorEquations(
        ModelDefinition model, ExpressionGraph free, Locker locker, FreeSymbols symbols, IReadOnlyList<RowGroup> rates, IReadOnlyList<RowGroup> switches)
    {
        Model = model;
        Free = free;
        Locked = locker.Graph;
        Symbols = symbols;
        Rates = rates;
        Switches = switches;
        SwitchFunctions = locker.Switches;
        _differentiator = new(Locked, rates.Concat(switches).Select(static group => group.Locked));
    }

    public ModelDefinition Model { get; }

    public ExpressionGraph Free { get; }

    public ExpressionGraph Locked { get; }

    /// <summary>The indices that nodes of <see cref="Locked"/> depend on.</summary>
    public FreeSymbols Symbols { get; }

    /// <summary>The rates, in the order of the state vector.</summary>
    public IReadOnlyList<RowGroup> Rates { get; }

    /// <summary>The switching functions, in the order of the regime. The free formula is the decision.</summary>
    public IReadOnlyList<RowGroup> Switches { get; }

    /// <summary>The kinds of the switching functions, in the same order.</summary>
    public IReadOnlyList<SwitchingFunction> SwitchFunctions { get; }

    /// <summary>What each node of <see cref="Free"/> changes with.</summary>
    public Dependence[] FreeDependences { get; private init; } = [];

    public IReadOnlyList<int> Observables { get; private init; } = [];

    public bool DependsOnTime { get; private init; }

    public static VectorEquations Of(ModelDefinition model, CancellationToken cancellationToken)
    {
        ExpressionGraph free = new(model.Nodes);
        RowGroup[] written = [.. WrittenRates(model)];
        int[] rates = [.. written.Select(static group => group.Free)];
        Locker locker = Locker.Lock(free, rates, cancellationToken);
        FreeSymbols symbols = new(model.Vectors!, locker.Graph);
        int[] decisions = Quiet.Forms(free, [.. locker.Switches.Select(static function => function.Decision)]);
        Dictionary<int, string> texts = [];
        foreach (ConditionText text in model.ConditionTexts) texts[text.Node] = text.Text;
        List<RowGroup> switches = [];
        foreach (SwitchingFunction function in locker.Switches)
        {
            string text = texts.TryGetValue(function.Source, out string? known) ? known : free[function.Source].Operator.ToString();
            symbols.AddSwitch(function.Value);
            switches.Add(new(-1, switches.Count, symbols.RangesOf(function.Value), decisions[switches.Count], function.Value, text));
        }

        Dependence[] dependences = Dependences.Of(free);
        int[] guarded = BranchGuard.Apply(free, rates);
        return new(
            model,
            free,
            locker,
            symbols,
            [.. written.Select((group, i) => group with { Free = guarded[i], Locked = locker[rates[i]] })],
            switches)
        {
            Observables = BranchGuard.Apply(free, [.. model.Observables.Select(static observable => observable.Value)]),
            DependsOnTime = rates.Any(rate => (dependences[rate] & Dependence.Time) != 0),
            FreeDependences = Dependences.Of(free),
        };
    }

    private static IEnumerable<RowGroup> WrittenRates(ModelDefinition model)
    {
        for (int i = 0; i < model.States.Count; i++)
        {
            StateDefinition state = model.States[i];
            yield return new(-1, i, EquatableArray<IndexRange>.Empty, state.Rate, -1, $"{state.Property.Name}: {state.RateText}");
        }

        for (int v = 0; v < model.Vectors!.States.Count; v++)
        {
            VectorStateDefinition state = model.Vectors.States[v];
            foreach (SegmentDefinition segment in state.Segments)
                yield return new(v, -1, segment.Ranges, segment.Rate, -1, $"{state.Property.Name}[{state.IndexNames}]: {state.RateText}");
        }
    }

    /// <summary>The derivative of a row by time.</summary>
    public int ByTime(RowGroup group, CancellationToken cancellationToken) =>
        At(_differentiator.Along([new(Locked.Leaf(Operator.Time), _differentiator.One)], cancellationToken), group.Locked);

    /// <summary>The derivatives of rows along a direction.</summary>
    public IReadOnlyList<int> AlongDirection(IEnumerable<RowGroup> groups, CancellationToken cancellationToken)
    {
        List<KeyValuePair<int, int>> seeds = [];
        foreach (int index in Reach.Of(Locked, groups.Select(static group => group.Locked)))
        {
            Node node = Locked[index];
            if (node.Operator == Operator.State) seeds.Add(new(index, Locked.Leaf(Operator.Direction, node.Index)));
            if (node.Operator == Operator.StateElement) seeds.Add(new(index, Locked.Leaf(Operator.DirectionElement, node.Index)));
        }

        Dictionary<int, int> derivatives = _differentiator.Along(seeds, cancellationToken);
        return [.. groups.Select(group => At(derivatives, group.Locked))];
    }

    /// <summary>The row's derivatives by all states or by all parameters.</summary>
    /// <param name="element">The kind of element: <see cref="Operator.StateElement"/> or <see cref="Operator.ParameterElement"/>.</param>
    public JacobianRow Row(RowGroup group, Operator element, CancellationToken cancellationToken) =>
        new JacobianRowBuilder(this, _differentiator, group, element, cancellationToken).Build();

    private int At(Dictionary<int, int> derivatives, int node) => derivatives.TryGetValue(node, out int derivative) ? derivative : _differentiator.Zero;
}
