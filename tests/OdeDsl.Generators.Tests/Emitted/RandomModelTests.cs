using CsCheck;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

public sealed partial class RandomModelTests(RandomModelBatch batch) : IClassFixture<RandomModelBatch>
{
    private const double Tolerance = 1e-12;

    private static readonly Gen<double[]> WithSpecials = Gen.Frequency(
        (12, RandomModels.Ordinary), (1, Gen.Const(0.0)), (1, Gen.Const(-0.0)), (1, Gen.OneOf(1.0, -2.0, double.NaN, double.PositiveInfinity, 1e300)))
        .Array[Point.Length];

    private static readonly Gen<double[]> Ordinary = RandomModels.Ordinary.Array[Point.Length];

    [Fact]
    public void Rates_and_observables_equal_an_interpreter_bit_for_bit_and_throw_where_it_throws() => batch.ForEach(WithSpecials, 16, static (model, point) =>
    {
        Interpreter interpreter = point.Interpret(new ExpressionGraph(model.Definition.Nodes));
        SameOutcome(
            () => [.. model.Definition.States.Select(state => interpreter[state.Rate])],
            () => model.Calls.Rates(point.Time, point.State, point.Parameters));
        SameOutcome(
            () => [.. model.Definition.Observables.Select(observable => interpreter[observable.Value])],
            () => model.Calls.Observables(point.Time, point.State, point.Parameters));
    });

    [Fact]
    public void Locked_rates_equal_the_rates_as_written_bit_for_bit_in_the_regime_of_the_point()
    {
        int compared = 0;
        batch.ForEach(Ordinary, 16, (model, point) =>
        {
            double[] regime = model.Calls.Regime(point.Time, point.State, point.Parameters);
            double[] functions = model.Calls.SwitchingFunctions(point.Time, point.State, point.Parameters, regime);
            if (regime.Length == 0 || functions.Any(static g => !double.IsFinite(g) || Math.Abs(g - Math.Round(g)) < 1e-9)) return;
            for (int k = 0; k < regime.Length; k++) Assert.Equal(model.Calls.Description.Switches[k].SideOf(functions[k]), regime[k]);
            if (!TryRates(model, point, out double[] rates)) return;
            SameBits(rates, model.Calls.Rates(point.Time, point.State, point.Parameters, regime));
            compared++;
        });
        Assert.True(compared > 200, $"only {compared} points compared");
    }

    [Fact]
    public void Derivatives_agree_with_forward_dual_numbers_to_twelve_digits()
    {
        int compared = 0;
        batch.ForEach(Ordinary, 12, (model, point) => compared += CompareDerivatives(model.Definition, model.Calls, point));
        Assert.True(compared > 5_000, $"only {compared} entries compared");
    }

    [Fact]
    public void Switching_functions_and_their_derivatives_are_those_of_the_locked_expressions()
    {
        int compared = 0;
        batch.ForEach(Ordinary, 6, (model, point) =>
        {
            ExpressionGraph graph = model.Equations.Locked;
            int[] functions = [.. model.Equations.Switches.Select(static function => function.Value)];
            double[] regime = model.Calls.Regime(point.Time, point.State, point.Parameters);
            Interpreter values = point.Interpret(graph, regime);
            SameBits([.. functions.Select(g => values[g])], model.Calls.SwitchingFunctions(point.Time, point.State, point.Parameters, regime));
            double[] jacobian = model.Calls.SwitchingJacobian(point.Time, point.State, point.Parameters, regime);
            double[] byTime = model.Calls.SwitchingTimeDerivative(point.Time, point.State, point.Parameters, regime);
            compared += Compare(graph, values, functions, Operator.State, RandomModels.StateCount, jacobian)
                + CompareByTime(graph, values, functions, point, byTime);
        });
        Assert.True(compared > 2_000, $"only {compared} entries compared");
    }

    [Fact]
    public void No_member_allocates() => batch.ForEach(Ordinary, 1, static (model, point) =>
    {
        if (!TryRates(model, point, out _) || !TryObservables(model, point)) return;
        Assert.Equal(0, model.Calls.AllocatedByEveryMember(point.Time, point.State, point.Parameters));
    });

    private static int CompareDerivatives(ModelDefinition model, IEmittedCalls calls, Point point)
    {
        ExpressionGraph graph = new(model.Nodes);
        Interpreter values = point.Interpret(graph);
        int[] rates = [.. model.States.Select(static state => state.Rate)];
        double[] regime = calls.Regime(point.Time, point.State, point.Parameters);
        if (!Try(() => [.. rates.Select(rate => values[rate])], out _)) return 0;

        double[] jacobian = calls.StateJacobian(point.Time, point.State, point.Parameters, regime);
        double[] sparse = calls.StateJacobianValues(point.Time, point.State, point.Parameters, regime);
        SameBits(Dense(calls.Description.StateSparsity, sparse), jacobian);
        double[] byParameters = calls.ParameterJacobian(point.Time, point.State, point.Parameters, regime);
        Assert.All(Enumerable.Range(0, byParameters.Length), k => Assert.True(
            byParameters[k] == 0 || calls.Description.ParameterSparsity.Contains(k / RandomModels.ParameterCount, k % RandomModels.ParameterCount)));
        double[] byParameterValues = calls.ParameterJacobianValues(point.Time, point.State, point.Parameters, regime);
        SameBits(Dense(calls.Description.ParameterSparsity, byParameterValues), byParameters);
        double[] byTime = calls.TimeDerivative(point.Time, point.State, point.Parameters, regime);
        double[] product = calls.JacobianVectorProduct(point.Time, point.State, point.Parameters, regime, point.Parameters);
        return Compare(graph, values, rates, Operator.State, RandomModels.StateCount, jacobian)
            + Compare(graph, values, rates, Operator.Parameter, RandomModels.ParameterCount, byParameters)
            + CompareByTime(graph, values, rates, point, byTime)
            + CompareAlong(graph, values, rates, node => node.Operator == Operator.State ? point.Parameters[node.Index] : 0, product);
    }

    private static int Compare(ExpressionGraph graph, Interpreter values, int[] roots, Operator leaf, int count, double[] matrix)
    {
        int compared = 0;
        for (int column = 0; column < count; column++)
        {
            double[] entries = [.. roots.Select((_, row) => matrix[(row * count) + column])];
            compared += CompareAlong(graph, values, roots, node => node.Operator == leaf && node.Index == column ? 1 : 0, entries);
        }

        return compared;
    }

    /// <summary>Time passes explicitly, and by way of the inputs with their slopes.</summary>
    private static int CompareByTime(ExpressionGraph graph, Interpreter values, int[] roots, Point point, double[] derivatives) => CompareAlong(
        graph,
        values,
        roots,
        node => node.Operator switch
        {
            Operator.Time => 1,
            Operator.Input => point.Parameters[node.Index + RandomModels.InputCount],
            _ => 0,
        },
        derivatives);

    private static int CompareAlong(ExpressionGraph graph, Interpreter values, int[] roots, Func<Node, double> seed, double[] derivatives)
    {
        int compared = 0;
        DualInterpreter dual = new(graph, values, seed);
        for (int row = 0; row < roots.Length; row++)
        {
            Tangent expected = dual[roots[row]];
            if (!double.IsFinite(values[roots[row]]) || !(expected.Scale < 1e100)) continue;
            double error = Math.Abs(derivatives[row] - expected.Derivative);
            Assert.True(error <= Tolerance * expected.Scale, $"{derivatives[row]:R} instead of {expected.Derivative:R} (scale {expected.Scale:R})");
            compared++;
        }

        return compared;
    }

    private static double[] Dense(Modeling.SparsityPattern pattern, double[] values)
    {
        double[] dense = new double[pattern.RowCount * pattern.ColumnCount];
        for (int row = 0; row < pattern.RowCount; row++)
        {
            for (int entry = pattern.RowStarts[row]; entry < pattern.RowStarts[row + 1]; entry++)
                dense[(row * pattern.ColumnCount) + pattern.Columns[entry]] = values[entry];
        }

        return dense;
    }

    private static bool TryRates(RandomModel model, Point point, out double[] rates) =>
        Try(() => model.Calls.Rates(point.Time, point.State, point.Parameters), out rates);

    private static bool TryObservables(RandomModel model, Point point) =>
        Try(() => model.Calls.Observables(point.Time, point.State, point.Parameters), out _);

    private static bool Try(Func<double[]> compute, out double[] values)
    {
        try
        {
            values = compute();
            return true;
        }
        catch (Exception fault) when (fault is ArgumentException or ArithmeticException)
        {
            values = [];
            return false;
        }
    }

    private static void SameOutcome(Func<double[]> expected, Func<double[]> actual)
    {
        if (!Try(expected, out double[] values))
        {
            Assert.True(Record.Exception(actual) is ArgumentException or ArithmeticException, "The interpreter threw, the emitted code did not.");
            return;
        }

        SameBits(values, actual());
    }

    /// <summary>The same bits; two NaN count as the same.</summary>
    private static void SameBits(double[] expected, double[] actual) => Assert.Equal(expected.Select(Bits), actual.Select(Bits));

    private static string Bits(double value) => double.IsNaN(value) ? "NaN" : $"{value:R} ({BitConverter.DoubleToInt64Bits(value):X16})";
}
