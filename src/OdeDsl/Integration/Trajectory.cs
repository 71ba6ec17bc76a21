using System.Globalization;
using System.Runtime.CompilerServices;
using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>
/// A simulated run: states at all times between its ends, by the continuation polynomial of each step. Safe to use from several
/// threads at once.
/// </summary>
public sealed class Trajectory
{
    /// <summary>Up to this many numbers, scratch space lies on the stack.</summary>
    internal const int SmallStateCount = 64;

    private readonly List<Crossing> crossings = [];
    private readonly List<EventOccurrence> events = [];
    private readonly List<(int Node, DynamicSystem System)> systems = [];
    private readonly List<IntegrationMethod> methods = [];

    internal Trajectory(DynamicSystem system, double time, IntegrationStatistics statistics)
    {
        System = system;
        Statistics = statistics;
        Store = new TrajectoryStore(system.StateCount, time, system.InitialState);
    }

    /// <summary>The system that was simulated.</summary>
    public DynamicSystem System { get; }

    /// <summary>The number of states.</summary>
    public int StateCount => System.StateCount;

    /// <summary>The time at which the run starts.</summary>
    public double StartTime => Times[0];

    /// <summary>The time at which the run ends; before the start time if time ran backwards.</summary>
    public double EndTime => Times[^1];

    /// <summary>The times of the steps' ends, the start first.</summary>
    public ReadOnlySpan<double> Times => Store.Times;

    /// <summary>The state at the end.</summary>
    public double[] FinalState => Store.State(Store.NodeCount - 1).ToArray();

    /// <summary>What the run cost.</summary>
    public IntegrationStatistics Statistics { get; }

    /// <summary>The meetings with surfaces of switching functions, in order.</summary>
    public IReadOnlyList<Crossing> Crossings => crossings;

    /// <summary>The events, in order. At the time of a jump the state is that after it.</summary>
    public IReadOnlyList<EventOccurrence> Events => events;

    /// <summary>The terminal event that ended the run, or <see langword="null"/> if none did.</summary>
    public EventOccurrence? EndedBy => events.Count > 0 && System.Description.Events[events[^1].Event].IsTerminal ? events[^1] : null;

    /// <summary>The methods in the order of their first use.</summary>
    public IReadOnlyList<IntegrationMethod> MethodsUsed => methods;

    internal TrajectoryStore Store { get; }

    /// <summary>A state or observable by name.</summary>
    /// <param name="name">The name of a state or observable of the model.</param>
    /// <returns>Its course.</returns>
    /// <exception cref="KeyNotFoundException">There is no such state or observable; the message lists those there are.</exception>
    public Series this[string name]
    {
        get
        {
            ArgumentNullException.ThrowIfNull(name);
            ModelDescription description = System.Description;
            int state = description.IndexOfState(name);
            if (state >= 0) return new Series(this, name, description.States[state].Unit, state, -1);
            int observable = description.IndexOfObservable(name);
            if (observable >= 0) return new Series(this, name, description.Observables[observable].Unit, -1, observable);
            IEnumerable<string> known =
            [
                .. Enumerable.Range(0, description.States.ScalarCount).Select(i => description.States[i].Name),
                .. description.StateVectors.Select(static vector => vector.NameOf(0) + " to " + vector.NameOf(vector.Count - 1)),
                .. description.Observables.Select(static item => item.Name),
            ];
            throw new KeyNotFoundException(
                $"{description.Name} has no state or observable named '{name}'. It has: {string.Join(", ", known)}.");
        }
    }

    /// <summary>
    /// A state or observable by its property, as in <c>run[tank.Level]</c> or <c>run[pipe.Temperature[3]]</c>: the property's name counts, not its
    /// value.
    /// </summary>
    /// <param name="member">The property, or an element of a vector with its index as a number.</param>
    /// <param name="expression">Supplied by the compiler: the property's text.</param>
    /// <returns>Its course.</returns>
    /// <exception cref="KeyNotFoundException">The text does not end in the name of a state or observable.</exception>
    /// <exception cref="ArgumentException">The text is an expression that computes something.</exception>
    public Series this[double member, [CallerArgumentExpression(nameof(member))] string expression = ""]
    {
        get
        {
            _ = member;
            int bracket = expression.EndsWith(']') ? expression.IndexOf('[', StringComparison.Ordinal) : expression.Length;
            string index = bracket < 0 ? expression : expression[bracket..];
            if (!index.All(static letter => char.IsAsciiDigit(letter) || letter is '[' or ']' or ',' or ' '))
                throw new ArgumentException($"Name an element by the number of its place, or as in run[model.Vector, k]; '{expression}' computes its index.", nameof(member));
            return this[NameIn(expression[..bracket]) + index];
        }
    }

    /// <summary>An element of a vector-valued state by its property, as in <c>run[pipe.Temperature, k]</c>.</summary>
    /// <param name="vector">The property.</param>
    /// <param name="index">The element's index.</param>
    /// <param name="expression">Supplied by the compiler: the property's text.</param>
    /// <returns>Its course.</returns>
    /// <exception cref="KeyNotFoundException">The text does not end in the name of a vector, or it has no such element.</exception>
    /// <exception cref="ArgumentException">The text is an expression that computes something.</exception>
    public Series this[double[] vector, int index, [CallerArgumentExpression(nameof(vector))] string expression = ""] =>
        this[string.Create(CultureInfo.InvariantCulture, $"{NameIn(expression)}[{index}]")];

    /// <summary>An element of a vector-valued state with rows and columns, as in <c>run[plate.Temperature, i, j]</c>.</summary>
    /// <param name="vector">The property.</param>
    /// <param name="row">The element's row.</param>
    /// <param name="column">The element's column.</param>
    /// <param name="expression">Supplied by the compiler: the property's text.</param>
    /// <returns>Its course.</returns>
    /// <exception cref="KeyNotFoundException">The text does not end in the name of a vector, or it has no such element.</exception>
    /// <exception cref="ArgumentException">The text is an expression that computes something.</exception>
    public Series this[double[,] vector, int row, int column, [CallerArgumentExpression(nameof(vector))] string expression = ""] =>
        this[string.Create(CultureInfo.InvariantCulture, $"{NameIn(expression)}[{row}, {column}]")];

    private string NameIn(string expression)
    {
        string path = expression.StartsWith("new ", StringComparison.Ordinal) ? expression[4..] : expression;
        if (!path.All(static letter => char.IsLetterOrDigit(letter) || letter is '.' or '_' or '@' or '(' or ')' or '?' or '!'))
            throw new ArgumentException($"Name one state or observable, as in run[model.Level]; '{expression}' computes something.", nameof(expression));
        // The longest ending that is a name: run[plant.Upper.Level] is the level of the upper tank.
        string[] parts = [.. path.Split('.').Select(static part => part.TrimStart('@').TrimEnd('(', ')', '?', '!'))];
        return Enumerable.Range(0, parts.Length).Select(i => string.Join('.', parts[i..])).FirstOrDefault(Has) ?? parts[^1];
    }

    private bool Has(string name) => System.Description.IndexOfState(name) >= 0 || System.Description.IndexOfObservable(name) >= 0;

    /// <summary>The state at a time.</summary>
    /// <param name="time">A time within the run.</param>
    /// <returns>The state, a new array.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The time lies outside the run or is not a number.</exception>
    public double[] At(double time)
    {
        var state = new double[StateCount];
        StateAt(time, state);
        return state;
    }

    /// <summary>The state at a time.</summary>
    /// <param name="time">A time within the run.</param>
    /// <param name="state">Receives n values.</param>
    /// <exception cref="ArgumentOutOfRangeException">The time lies outside the run or is not a number, or too little room.</exception>
    public void StateAt(double time, Span<double> state)
    {
        RequireInside(time);
        if (Store.NodeCount == 1)
        {
            Store.State(0).CopyTo(state);
            return;
        }

        int step = Store.StepOf(time);
        if (time == Times[step + 1]) Store.State(step + 1).CopyTo(state);
        else if (time == Times[step]) Store.State(step).CopyTo(state);
        else Store.Evaluate(step, Store.Theta(step, time), state);
    }

    /// <summary>The state at the end of a step.</summary>
    /// <param name="node">The index into <see cref="Times"/>.</param>
    /// <returns>The n values.</returns>
    public ReadOnlySpan<double> StateAtNode(int node)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(node);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(node, Store.NodeCount);
        return Store.State(node);
    }

    /// <summary>Equally spaced times over the run, both ends included.</summary>
    /// <param name="count">How many, at least 2.</param>
    /// <returns>The times.</returns>
    /// <exception cref="ArgumentOutOfRangeException">Fewer than 2.</exception>
    public double[] SampleTimes(int count)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 2);
        var times = new double[count];
        for (int i = 0; i < count; i++) times[i] = StartTime + (EndTime - StartTime) * i / (count - 1);
        times[^1] = EndTime;
        return times;
    }

    /// <summary>The states at equally spaced times, both ends included.</summary>
    /// <param name="count">How many, at least 2.</param>
    /// <returns>The states at <see cref="SampleTimes"/>.</returns>
    /// <exception cref="ArgumentOutOfRangeException">Fewer than 2.</exception>
    public double[][] Sample(int count) => Array.ConvertAll(SampleTimes(count), At);

    internal void Append(Stepper stepper)
    {
        Store.Append(stepper);
        if (!methods.Contains(stepper.Method)) methods.Add(stepper.Method);
    }

    internal void Append(Crossing crossing) => crossings.Add(crossing);

    /// <summary>Adds events that happened where the run has arrived, and the jump they make.</summary>
    internal void Append(IReadOnlyList<EventOccurrence> happened)
    {
        events.AddRange(happened);
        EventOccurrence last = happened[^1];
        Store.AppendJump(last.After.AsSpan());
        if (last.Modes.Length > 0) systems.Add((Store.NodeCount - 1, System.WithModes(last.Modes.AsSpan())));
    }

    /// <summary>The system with the modes that it has from a node on.</summary>
    internal DynamicSystem SystemAt(int node)
    {
        int low = 0, high = systems.Count;
        while (low < high)
        {
            int middle = (low + high) / 2;
            if (systems[middle].Node <= node) low = middle + 1;
            else high = middle;
        }

        return low == 0 ? System : systems[low - 1].System;
    }

    internal void RequireInside(double time)
    {
        (double low, double high) = StartTime <= EndTime ? (StartTime, EndTime) : (EndTime, StartTime);
        if (!(time >= low && time <= high))
            throw new ArgumentOutOfRangeException(nameof(time), time, $"The run covers the times from {low:g9} to {high:g9}.");
    }
}
