using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>Everything that is computed for a model, as expressions: what the user wrote, its locked form and the derivatives.</summary>
internal sealed class ModelEquations
{
    private ModelEquations(ExpressionGraph free, ExpressionGraph locked)
    {
        Free = free;
        Locked = locked;
    }

    /// <summary>The expressions as written: rates, observables and the decisions of the switches.</summary>
    public ExpressionGraph Free { get; }

    /// <summary>The locked expressions and all derivatives.</summary>
    public ExpressionGraph Locked { get; }

    public IReadOnlyList<SwitchingFunction> Switches { get; private init; } = [];

    /// <summary>The rates as written, nodes of <see cref="Free"/>; likewise the observables.</summary>
    public IReadOnlyList<int> Rates { get; private init; } = [];

    public IReadOnlyList<int> Observables { get; private init; } = [];

    /// <summary>The rates as written and the locked rates and switching functions, in the form that runs on any kind of number.</summary>
    public IReadOnlyList<int> GenericRates { get; private init; } = [];

    public IReadOnlyList<int> GenericLockedRates { get; private init; } = [];

    public IReadOnlyList<int> GenericSwitches { get; private init; } = [];

    /// <summary>What each node of <see cref="Free"/> changes with.</summary>
    public Dependence[] FreeDependences { get; private init; } = [];

    public bool DependsOnTime { get; private init; }

    /// <summary>What concerns events, if the model has any.</summary>
    public EventEquations? Events { get; private init; }

    public IReadOnlyList<int> LockedRates { get; private init; } = [];

    public SparseMatrix StateJacobian { get; private init; } = null!;

    public SparseMatrix ParameterJacobian { get; private init; } = null!;

    public IReadOnlyList<int> TimeDerivative { get; private init; } = [];

    public IReadOnlyList<int> JacobianVectorProduct { get; private init; } = [];

    public SparseMatrix SwitchingJacobian { get; private init; } = null!;

    public IReadOnlyList<int> SwitchingTimeDerivative { get; private init; } = [];

    public static ModelEquations Of(ModelDefinition model, CancellationToken cancellationToken)
    {
        ExpressionGraph free = new(model.Nodes);
        int[] rates = [.. model.States.Select(static state => state.Rate)];
        int[] guards = [.. model.Events.Select(static item => item.Value)];
        Locker locker = Locker.Lock(free, [.. rates, .. guards], cancellationToken);
        int[] lockedGuards = [.. guards.Select(guard => locker[guard])];
        int[] lockedRates = [.. rates.Select(rate => locker[rate])];
        int[] surfaces = [.. locker.Switches.Select(static function => function.Value)];
        DerivativeTable derivatives = new(locker.Graph, [.. lockedRates, .. surfaces, .. lockedGuards]);

        SparseMatrix byState = derivatives.By(Operator.State, model.States.Count, cancellationToken);
        int[] byTime = derivatives.ByTime(model.Inputs.Count, cancellationToken);
        int[] alongDirection = derivatives.AlongDirection(model.States.Count, cancellationToken);
        SwitchingFunction[] switches = WithQuietDecisions(free, locker.Switches);
        Dependence[] dependences = Dependences.Of(free);
        int count = lockedRates.Length, beforeGuards = count + surfaces.Length;
        return new ModelEquations(free, locker.Graph)
        {
            Switches = switches,
            Rates = BranchGuard.Apply(free, rates),
            Observables = BranchGuard.Apply(free, [.. model.Observables.Select(static observable => observable.Value)]),
            GenericRates = GenericForms.Of(free, rates),
            GenericLockedRates = GenericForms.Of(locker.Graph, lockedRates),
            GenericSwitches = GenericForms.Of(locker.Graph, surfaces),
            FreeDependences = dependences,
            DependsOnTime = rates.Concat(guards).Concat(model.Events.SelectMany(static item => item.States.Concat(item.Modes)))
                .Any(root => (dependences[root] & Dependence.Time) != 0),
            Events = guards.Length == 0 ? null : EventEquations.Of(
                model, free, Rows(byState, beforeGuards, guards.Length), lockedGuards, [.. byTime.Skip(beforeGuards)], cancellationToken),
            LockedRates = lockedRates,
            StateJacobian = Rows(byState, 0, count),
            SwitchingJacobian = Rows(byState, count, surfaces.Length),
            ParameterJacobian = Rows(derivatives.By(Operator.Parameter, model.Parameters.Count, cancellationToken), 0, count),
            TimeDerivative = [.. byTime.Take(count)],
            SwitchingTimeDerivative = [.. byTime.Skip(count).Take(surfaces.Length)],
            JacobianVectorProduct = [.. alongDirection.Take(count)],
        };
    }

    /// <summary>A regime is decided for all conditions at once, also for those that the user's code would not come to.</summary>
    private static SwitchingFunction[] WithQuietDecisions(ExpressionGraph free, IReadOnlyList<SwitchingFunction> switches)
    {
        int[] decisions = Quiet.Forms(free, [.. switches.Select(static function => function.Decision)]);
        return [.. switches.Select((function, i) => function with { Decision = decisions[i] })];
    }

    private static SparseMatrix Rows(SparseMatrix matrix, int first, int count)
    {
        List<MatrixEntry> entries = [];
        foreach (MatrixEntry entry in matrix.Entries)
        {
            if (entry.Row >= first && entry.Row < first + count) entries.Add(entry with { Row = entry.Row - first });
        }

        return new SparseMatrix(count, matrix.Columns, entries);
    }
}
