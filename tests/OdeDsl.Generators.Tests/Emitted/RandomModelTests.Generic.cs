using OdeDsl.Generators.Algebra;
using OdeDsl.Scalars;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The generic forms of random models on every kind of number.</summary>
public sealed partial class RandomModelTests
{
    private const int BoxesPerModel = 12;
    private const int SamplesPerBox = 1000;

    [Fact]
    public void Generic_forms_at_double_equal_the_plain_ones_bit_for_bit() => batch.ForEach(WithSpecials, 16, static (model, point) =>
    {
        (ScalarDouble time, ScalarDouble[] state, ScalarDouble[] parameters) = Lift<ScalarDouble>(point);
        if (!TryRates(model, point, out double[] rates))
        {
            // Beyond a table that holds no value there, both fail; other functions give NaN where the user's code would throw.
            Exception? thrown = Record.Exception(() => model.Calls.RatesOver(time, state, parameters));
            Assert.True(thrown is null or TableRangeException, thrown?.ToString());
            return;
        }

        SameBits(rates, Values(model.Calls.RatesOver(time, state, parameters)));
        double[] regime = model.Calls.Regime(point.Time, point.State, point.Parameters);
        SameBits(
            model.Calls.Rates(point.Time, point.State, point.Parameters, regime),
            Values(model.Calls.RatesOver(time, state, parameters, regime)));
        SameBits(
            model.Calls.SwitchingFunctions(point.Time, point.State, point.Parameters, regime),
            Values(model.Calls.SwitchingFunctionsOver(time, state, parameters, regime)));
    });

    /// <summary>
    /// Functions of intervals are widened by 4 units in the last place, those of lanes are off by up to 5: the lanes must lie within the
    /// enclosure of the point, with its radius half as large again (lanes of a rate with no such function: in the very same bits).
    /// </summary>
    [Fact]
    public void Lanes_equal_doubles_lane_by_lane_up_to_the_error_of_their_functions()
    {
        int exact = 0, close = 0;
        batch.ForEach(Ordinary, 8, (model, point) =>
        {
            if (!TryRates(model, point, out _)) return;
            Random random = new(5);
            double[][] states = [.. Enumerable.Range(0, Lanes8.Count).Select(_ => Array.ConvertAll(point.State, x => x + random.NextDouble()))];
            double[] regime = model.Calls.Regime(point.Time, point.State, point.Parameters);
            Lanes4[] four = [.. Enumerable.Range(0, RandomModels.StateCount).Select(i => new Lanes4([.. states.Take(4).Select(x => x[i])]))];
            Lanes8[] eight = [.. Enumerable.Range(0, RandomModels.StateCount).Select(i => new Lanes8([.. states.Select(x => x[i])]))];
            Lanes4[] ratesOfFour = model.Calls.RatesOver(Lanes4.Constant(point.Time), four, Lift<Lanes4>(point).Parameters, regime);
            Lanes8[] ratesOfEight = model.Calls.RatesOver(Lanes8.Constant(point.Time), eight, Lift<Lanes8>(point).Parameters, regime);
            for (int lane = 0; lane < Lanes8.Count; lane++)
            {
                double[] rates = model.Calls.Rates(point.Time, states[lane], point.Parameters, regime);
                Point at = point with { State = states[lane] };
                (Interval time, Interval[] state, Interval[] parameters) = Lift<Interval>(at);
                Interval[] enclosures = model.Calls.RatesOver(time, state, parameters, regime);
                for (int i = 0; i < rates.Length; i++)
                {
                    double[] inLane = lane < Lanes4.Count ? [ratesOfFour[i][lane], ratesOfEight[i][lane]] : [ratesOfEight[i][lane]];
                    foreach (double value in inLane)
                    {
                        if (Bits(value) == Bits(rates[i])) exact++;
                        else if (IsRoundedInEveryStep(model, i)) Assert.Fail($"{value:R} instead of {rates[i]:R}");
                        else if (enclosures[i].IsBounded && double.IsFinite(rates[i]))
                        {
                            double radius = (enclosures[i].Upper - enclosures[i].Lower) / 2;
                            Assert.True(Math.Abs(value - enclosures[i].Midpoint) <= 1.5 * radius, $"{value:R}, {enclosures[i]}");
                            close++;
                        }
                    }
                }
            }
        });
        Assert.True(exact > 10_000, $"only {exact} equal");
        Assert.True(close > 100, $"only {close} close");
    }

    [Fact]
    public void The_linear_terms_of_series_agree_with_the_symbolic_derivatives_to_twelve_digits()
    {
        int compared = 0;
        batch.ForEach(Ordinary, 12, (model, point) =>
        {
            if (!TryRates(model, point, out _)) return;
            double[] regime = model.Calls.Regime(point.Time, point.State, point.Parameters);
            Jet<Order3>[] state = [.. point.State.Select((x, i) => Jet<Order3>.Variable(x, point.Parameters[i]))];
            (Jet<Order3> time, _, Jet<Order3>[] parameters) = Lift<Jet<Order3>>(point);
            Jet<Order3>[] rates = model.Calls.RatesOver(time, state, parameters, regime);
            SameBits(model.Calls.Rates(point.Time, point.State, point.Parameters, regime), [.. rates.Select(static rate => rate.Value)]);

            ExpressionGraph graph = new(model.Definition.Nodes);
            Interpreter values = point.Interpret(graph);
            double[] symbolic = model.Calls.JacobianVectorProduct(point.Time, point.State, point.Parameters, regime, point.Parameters);
            DualInterpreter dual = new(graph, values, node => node.Operator == Operator.State ? point.Parameters[node.Index] : 0);
            for (int i = 0; i < rates.Length; i++)
            {
                double scale = dual[model.Definition.States[i].Rate].Scale;
                if (!double.IsFinite(symbolic[i]) || !double.IsFinite(rates[i][1]) || !(scale < 1e100)) continue;
                Assert.True(Math.Abs(rates[i][1] - symbolic[i]) <= Tolerance * scale, $"{rates[i]} against {symbolic[i]:R}, scale {scale:R}");
                compared++;
            }
        });
        Assert.True(compared > 2_000, $"only {compared} compared");
    }

    [Fact]
    public void Intervals_contain_the_rates_at_millions_of_points_of_their_boxes()
    {
        int compared = 0, bounded = 0;
        batch.ForEach(Ordinary, BoxesPerModel, (model, point) =>
        {
            Random random = new(9);
            double size = Math.Pow(10, -3 * random.NextDouble());
            (double Lower, double Upper) Around(double x) => (x - (size * random.NextDouble()), x + (size * random.NextDouble()));
            (double Lower, double Upper)[] box = [.. point.State.Concat(point.Parameters).Append(point.Time).Select(Around)];
            Interval[] intervals = [.. box.Select(static side => new Interval(side.Lower, side.Upper))];
            Interval[] rates;
            try
            {
                rates = model.Calls.RatesOver(intervals[^1], intervals[..RandomModels.StateCount], intervals[RandomModels.StateCount..^1]);
            }
            catch (TableRangeException)
            {
                return; // The box reaches beyond a table that holds no value there.
            }

            bounded += rates.Count(static rate => rate.IsBounded);
            double[] sample = new double[box.Length], values = new double[rates.Length];
            for (int k = 0; k < SamplesPerBox; k++)
            {
                for (int i = 0; i < box.Length; i++)
                    sample[i] = Math.Min(box[i].Upper, box[i].Lower + ((box[i].Upper - box[i].Lower) * random.NextDouble()));
                if (!TryRatesInto(model, sample, values)) continue;
                for (int i = 0; i < values.Length; i++)
                {
                    if (double.IsNaN(values[i])) continue;
                    Assert.True(
                        rates[i].Contains(values[i]) || LeavesADomain(model, sample),
                        $"rate {i}: {values[i]:R} is not in {rates[i]}, at {string.Join(", ", sample.Select(static x => x.ToString("R")))}");
                    compared++;
                }
            }
        });
        Assert.True(compared > 2_000_000, $"only {compared} compared");
        Assert.True(bounded > 1_000, $"only {bounded} bounded enclosures");
    }

    /// <summary>Whether a value on the way is not a number or infinite: enclosures leave points outside the domain of a function out.</summary>
    private static bool LeavesADomain(RandomModel model, double[] sample)
    {
        Point point = new(sample[^1], sample[..RandomModels.StateCount], sample[RandomModels.StateCount..^1]);
        ExpressionGraph graph = new(model.Definition.Nodes);
        Interpreter interpreter = point.Interpret(graph);
        return Enumerable.Range(0, graph.Count).Any(node => !graph.IsCondition(node) && !double.IsFinite(Value(interpreter, node)));
    }

    private static double Value(Interpreter interpreter, int node) => Try(() => [interpreter[node]], out double[] value) ? value[0] : double.NaN;

    private static bool TryRatesInto(RandomModel model, double[] sample, double[] values)
    {
        try
        {
            ReadOnlySpan<double> all = sample;
            model.Calls.RatesInto(sample[^1], all[..RandomModels.StateCount], all[RandomModels.StateCount..^1], values);
            return true;
        }
        catch (Exception fault) when (fault is ArgumentException or ArithmeticException)
        {
            return false;
        }
    }

    /// <summary>Whether a locked rate holds no function that lanes compute in their own way.</summary>
    private static bool IsRoundedInEveryStep(RandomModel model, int rate)
    {
        ExpressionGraph graph = model.Equations.Locked;
        return Reach.Of(graph, [model.Equations.GenericLockedRates[rate]]).All(node => graph[node].Operator is not
            (Operator.Sin or Operator.Cos or Operator.Tan or Operator.Exp or Operator.Log or Operator.Log2 or Operator.Log10 or Operator.Pow
            or Operator.Sinh or Operator.Cosh or Operator.Tanh));
    }

    private static (T Time, T[] State, T[] Parameters) Lift<T>(Point point)
        where T : unmanaged, IScalar<T> =>
        (T.Constant(point.Time), [.. point.State.Select(T.Constant)], [.. point.Parameters.Select(T.Constant)]);

    private static double[] Values(ScalarDouble[] numbers) => [.. numbers.Select(static number => number.Value)];
}
