using OdeDsl.Modeling;

namespace OdeDsl.Generators.Tests.Vectors;

/// <summary>What must hold for every model with vectors, whatever its equations.</summary>
internal static class VectorChecks
{
    /// <summary>Rounding of central differences at the step used: the cube root of the rounding error, squared, with room for curvature.</summary>
    private const double DifferenceTolerance = 2e-7;

    private const double Step = 1e-5;

    public static void All(VectorRun run, int seed)
    {
        (double time, double[] state, double[] parameters) = Point(run.System, seed);
        DynamicSystem system = run.System.WithParameters(parameters);
        double[] regime = new double[system.SwitchCount];
        system.Regime(time, state, regime);
        RatesAreTheUsersOwn(run, system, time, state, parameters, regime);
        SwitchesDecideTheRegime(system, time, state, regime);
        double[] jacobian = StateJacobianIsTheSlopeOfTheRates(system, time, state, regime);
        ValuesAreTheMatrix(run, system, time, state, parameters, regime, jacobian);
        ParameterJacobianIsTheSlopeOfTheRates(system, time, state, regime);
        TimeDerivativeIsTheSlopeOfTheRates(system, time, state, regime);
        Assert.Equal(0, run.AllocatedByEveryMember(time, state, parameters));
    }

    /// <summary>A point without special values: states around one, parameters around their own values.</summary>
    public static (double Time, double[] State, double[] Parameters) Point(DynamicSystem system, int seed)
    {
        Random random = new(seed);
        double[] state = [.. Enumerable.Range(0, system.StateCount).Select(_ => 0.3 + 1.4 * random.NextDouble())];
        double[] parameters = [.. system.Parameters.ToArray().Select((value, i) =>
            system.Description.Parameters[i].IsFixed ? value : value * (0.7 + 0.6 * random.NextDouble()))];
        return (random.NextDouble(), state, parameters);
    }

    private static void RatesAreTheUsersOwn(VectorRun run, DynamicSystem system, double time, double[] state, double[] parameters, double[] regime)
    {
        double[] written = run.Written(time, state, parameters);
        double[] rates = new double[system.StateCount], locked = new double[system.StateCount], observables = new double[system.Description.Observables.Length];
        Array.Fill(rates, double.NaN);
        Array.Fill(locked, double.NaN);
        system.Rates(time, state, rates);
        system.Rates(time, state, regime, locked);
        system.Observables(time, state, observables);
        for (int i = 0; i < written.Length; i++)
        {
            double generated = i < rates.Length ? rates[i] : observables[i - rates.Length];
            Assert.True(Same(written[i], generated), $"{system.Description.Name} row {i}: written {written[i]:R}, generated {generated:R}");
        }

        for (int i = 0; i < rates.Length; i++) Assert.True(Same(rates[i], locked[i]), $"{system.Description.Name} row {i}: free {rates[i]:R}, locked {locked[i]:R}");
    }

    private static bool Same(double a, double b) =>
        BitConverter.DoubleToInt64Bits(a) == BitConverter.DoubleToInt64Bits(b) || (double.IsNaN(a) && double.IsNaN(b));

    private static void SwitchesDecideTheRegime(DynamicSystem system, double time, double[] state, double[] regime)
    {
        double[] values = new double[system.SwitchCount];
        Array.Fill(values, double.NaN);
        system.SwitchingFunctions(time, state, regime, values);
        for (int k = 0; k < values.Length; k++)
            Assert.True(system.Description.Switches[k].SideOf(values[k], regime[k]) == regime[k], $"{system.Description.Name}: {system.Description.Switches[k].Text} is {values[k]:R}");
        double[] jacobian = new double[system.SwitchCount * system.StateCount];
        Array.Fill(jacobian, double.NaN);
        system.SwitchingJacobian(time, state, regime, jacobian);
        AssertSlopes(system, "switching function", jacobian, system.SwitchCount, system.StateCount, (i, step, result) =>
        {
            double[] moved = [.. state];
            moved[i] += step;
            system.SwitchingFunctions(time, moved, regime, result);
        });
    }

    private static double[] StateJacobianIsTheSlopeOfTheRates(DynamicSystem system, double time, double[] state, double[] regime)
    {
        double[] jacobian = new double[system.StateCount * system.StateCount];
        Array.Fill(jacobian, double.NaN);
        system.StateJacobian(time, state, regime, jacobian);
        AssertSlopes(system, "state", jacobian, system.StateCount, system.StateCount, (i, step, result) =>
        {
            double[] moved = [.. state];
            moved[i] += step;
            system.Rates(time, moved, regime, result);
        });
        return jacobian;
    }

    private static void ParameterJacobianIsTheSlopeOfTheRates(DynamicSystem system, double time, double[] state, double[] regime)
    {
        double[] jacobian = new double[system.StateCount * system.ParameterCount];
        Array.Fill(jacobian, double.NaN);
        system.ParameterJacobian(time, state, regime, jacobian);
        AssertSlopes(system, "parameter", jacobian, system.StateCount, system.ParameterCount, (i, step, result) =>
        {
            bool isFixed = system.Description.Parameters[i].IsFixed;
            DynamicSystem moved = isFixed ? system : system.WithParameter(i, system.Parameters[i] + step);
            moved.Rates(time, state, regime, result);
        });
        SparsityPattern pattern = system.Description.ParameterSparsity;
        for (int entry = 0; entry < jacobian.Length; entry++)
        {
            if (jacobian[entry] != 0) Assert.True(pattern.Contains(entry / system.ParameterCount, entry % system.ParameterCount));
        }
    }

    private static void TimeDerivativeIsTheSlopeOfTheRates(DynamicSystem system, double time, double[] state, double[] regime)
    {
        double[] derivative = new double[system.StateCount];
        Array.Fill(derivative, double.NaN);
        system.TimeDerivative(time, state, regime, derivative);
        AssertSlopes(system, "time", derivative, system.StateCount, 1, (_, step, result) => system.Rates(time + step, state, regime, result));
    }

    private static void ValuesAreTheMatrix(
        VectorRun run, DynamicSystem system, double time, double[] state, double[] parameters, double[] regime, double[] jacobian)
    {
        int n = system.StateCount;
        SparsityPattern pattern = system.Description.StateSparsity;
        double[] spread = new double[Math.Max(n * n, pattern.EntryCount)];
        run.StateJacobianValues(time, state, parameters, regime).CopyTo(spread, 0);
        pattern.Expand(spread);
        double[] direction = [.. state.Select(static (value, i) => value - 0.1 * i)];
        double[] product = run.JacobianVectorProduct(time, state, parameters, regime, direction);
        for (int i = 0; i < n; i++)
        {
            double expected = 0, size = 0;
            for (int j = 0; j < n; j++)
            {
                double entry = jacobian[i * n + j];
                Assert.True(Math.Abs(entry - spread[i * n + j]) <= 1e-13 * (1 + Math.Abs(entry)), $"{system.Description.Name} entry ({i}, {j}): {entry:R} and {spread[i * n + j]:R}");
                expected += entry * direction[j];
                size += Math.Abs(entry * direction[j]);
            }

            Assert.True(Math.Abs(product[i] - expected) <= 1e-12 * (1 + size), $"{system.Description.Name} product {i}: {product[i]:R}, expected {expected:R}");
        }
    }

    /// <summary>Compares a matrix with central differences.</summary>
    private static void AssertSlopes(DynamicSystem system, string by, double[] matrix, int rows, int columns, Action<int, double, double[]> evaluate)
    {
        double[] up = new double[rows], down = new double[rows];
        for (int j = 0; j < columns; j++)
        {
            evaluate(j, Step, up);
            evaluate(j, -Step, down);
            for (int i = 0; i < rows; i++)
            {
                double slope = (up[i] - down[i]) / (2 * Step);
                double entry = matrix[i * columns + j];
                double scale = 1 + Math.Abs(slope) + Math.Abs(up[i]);
                Assert.True(Math.Abs(entry - slope) <= DifferenceTolerance * scale, $"{system.Description.Name} ({by}) entry ({i}, {j}): {entry:R}, by differences {slope:R}\n");
            }
        }
    }
}
