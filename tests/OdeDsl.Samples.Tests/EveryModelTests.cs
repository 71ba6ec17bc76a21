using System.Reflection;
using OdeDsl;
using OdeDsl.Modeling;

namespace Tarnwater.Tests;

public class EveryModelTests
{
    private const int Points = 40;

    [Fact]
    public void SurgeTank_is_what_it_says() => Check(new SurgeTank());

    [Fact]
    public void TieLineMachine_is_what_it_says() => Check(new TieLineMachine());

    [Fact]
    public void UnbalancedDrum_is_what_it_says() => Check(new UnbalancedDrum());

    [Fact]
    public void SludgeBasin_is_what_it_says() => Check(new SludgeBasin());

    [Fact]
    public void HeatedReactor_is_what_it_says() => Check(new HeatedReactor());

    [Fact]
    public void SumpRelay_is_what_it_says() => Check(new SumpRelay());

    [Fact]
    public void StirredMixer_is_what_it_says() => Check(new StirredMixer());

    /// <summary>At random places: generated rates equal the class's own members bit for bit, analytic derivatives agree with differences.</summary>
    private static void Check<TModel, TSystem>(IOdeModel<TModel, TSystem> model)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        ModelDescription description = TSystem.Description;
        Assert.NotEqual("", description.TimeUnit);
        Assert.NotEqual("", description.Summary);
        Assert.All(description.States, static state => Assert.True(state is { Unit.Length: > 0, Summary.Length: > 0 } && double.IsFinite(state.Upper - state.Lower)));
        Assert.All(description.Parameters, static item => Assert.True(item is { Unit.Length: > 0, Summary.Length: > 0 } && double.IsFinite(item.Upper - item.Lower)));
        Random random = new(20260101);
        for (int point = 0; point < Points; point++)
        {
            double[] state = [.. description.States.Select(item => Between(item.Lower, item.Upper, random))];
            double[] parameters = [.. description.Parameters.Select(item => Between(item.Lower, item.Upper, random))];
            model.WriteState(state);
            model.WriteParameters(parameters);
            DynamicSystem system = DynamicSystem.Of(model);
            CheckRates(model, system, state);
            CheckStateJacobian(system, state);
            CheckParameterJacobian(system, state);
        }
    }

    private static double Between(double lower, double upper, Random random) => lower + (upper - lower) * random.NextDouble();

    private static void CheckRates(object model, DynamicSystem system, double[] state)
    {
        double[] rates = new double[state.Length];
        system.Rates(0, state, rates);
        foreach (PropertyInfo property in model.GetType().GetProperties(BindingFlags.Instance | BindingFlags.NonPublic | BindingFlags.Public))
        {
            if (property.GetCustomAttribute<RateAttribute>() is not { } mark) continue;
            double own = (double)property.GetValue(model)!, generated = rates[system.Description.IndexOfState(mark.State)];
            Assert.Equal(BitConverter.DoubleToInt64Bits(own), BitConverter.DoubleToInt64Bits(generated));
        }
    }

    private static void CheckStateJacobian(DynamicSystem system, double[] state)
    {
        int n = state.Length;
        double[] regime = new double[system.SwitchCount], jacobian = new double[n * n];
        system.Regime(0, state, regime);
        system.StateJacobian(0, state, regime, jacobian);
        for (int column = 0; column < n; column++)
        {
            double extent = system.Description.States[column].Upper - system.Description.States[column].Lower;
            CheckColumn(column, n, jacobian, extent, change =>
            {
                double[] moved = [.. state], rates = new double[n];
                moved[column] += change;
                system.Rates(0, moved, regime, rates);
                return rates;
            });
        }
    }

    private static void CheckParameterJacobian(DynamicSystem system, double[] state)
    {
        int n = state.Length, m = system.ParameterCount;
        double[] regime = new double[system.SwitchCount], jacobian = new double[n * m];
        system.Regime(0, state, regime);
        system.ParameterJacobian(0, state, regime, jacobian);
        for (int column = 0; column < m; column++)
        {
            double value = system.Parameters[column];
            CheckColumn(column, m, jacobian, Math.Abs(value), change =>
            {
                double[] rates = new double[n];
                system.WithParameter(column, value + change).Rates(0, state, regime, rates);
                return rates;
            });
        }
    }

    /// <summary>
    /// Compares a column with extrapolated central differences. Their attainable accuracy is about 1e-10 of the larger of the derivative and of
    /// (rate / step): rounding errors of the rate are divided by the step. The generator's own tests compare derivatives to 1e-12 by
    /// dual numbers; here the point is an independent path.
    /// </summary>
    private static void CheckColumn(int column, int columns, double[] jacobian, double extent, Func<double, double[]> rates)
    {
        double[] size = rates(0);
        double step = 0.02 * extent;
        double[] differences = Differences.Extrapolated(rates, step);
        for (int row = 0; row < size.Length; row++)
        {
            double analytic = jacobian[row * columns + column];
            double tolerance = 1e-9 * Math.Max(Math.Abs(analytic), Math.Abs(size[row]) / step);
            Assert.True(Math.Abs(analytic - differences[row]) <= tolerance, $"row {row}, column {column}: {analytic:R} against {differences[row]:R}");
        }
    }
}
