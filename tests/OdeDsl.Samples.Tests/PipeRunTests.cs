using System.Reflection;
using MathNet.Numerics;
using OdeDsl;
using OdeDsl.Equilibria;
using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace Tarnwater.Tests;

public class PipeRunTests
{
    private static readonly int[] CellsAtRest = [8, 16, 32];

    private static readonly int[] CellsOfFront = [80, 160, 320];

    /// <summary>Rows of the central-difference matrix: two at the ends, three between.</summary>
    private static int EntriesOf(int cells) => 3 * cells - 2;

    [Theory]
    [InlineData(2)]
    [InlineData(10)]
    [InlineData(57)]
    public void Generated_rates_equal_the_class_own_members_bit_for_bit(int cells)
    {
        PipeRun pipe = new() { Cells = cells };
        Random random = new(cells);
        for (int i = 0; i < cells; i++) pipe.Temperature[i] = 100 * random.NextDouble();
        double[] rates = new double[cells];

        DynamicSystem.Of(pipe).Rates(0, pipe.Temperature, rates);

        MethodInfo own = typeof(PipeRun).GetMethod("TemperatureRate", BindingFlags.Instance | BindingFlags.NonPublic)!;
        for (int i = 0; i < cells; i++)
            Assert.Equal(BitConverter.DoubleToInt64Bits((double)own.Invoke(pipe, [i])!), BitConverter.DoubleToInt64Bits(rates[i]));
    }

    // D T'' - v T' - k T = 0 with T(0) given and T'(L) = 0 (linear with constant coefficients; e.g. M. T. van Genuchten and W. J. Alves, Analytical
    // solutions of the one-dimensional convective-dispersive solute transport equation, U.S. Department of Agriculture, Technical Bulletin 1661,
    // 1982, first-type inlet, finite profile, first-order decay; from memory).
    private static double SteadyTemperature(PipeRun pipe, double x)
    {
        double v = pipe.Velocity, d = pipe.Mixing, k = pipe.LossRate, length = pipe.Length;
        double root = Math.Sqrt(v * v + 4 * k * d);
        double rising = (v + root) / (2 * d), falling = (v - root) / (2 * d);
        // Written so that nothing overflows: both exponents are at most zero.
        double share = -falling / rising * Math.Exp((falling - rising) * length);
        double shape = (Math.Exp(falling * x) + share * Math.Exp(rising * x)) / (1 + share);
        return pipe.GroundTemperature + (pipe.InletTemperature - pipe.GroundTemperature) * shape;
    }

    [Theory]
    [InlineData(100)]
    [InlineData(300)]
    [InlineData(600)]
    public void The_rest_approaches_the_closed_form_with_the_second_order_in_the_cell(double length)
    {
        double[] errors = [.. CellsAtRest.Select(cells =>
        {
            PipeRun pipe = new() { Cells = cells, Length = length, Mixing = 40 };
            double[] rest = Assert.Single(pipe.FindEquilibria().Equilibria).State.ToArray();
            return rest.Select((value, i) => Math.Abs(value - SteadyTemperature(pipe, (i + 0.5) * length / cells))).Max();
        })];

        Assert.True(errors[2] <= 0.1, $"{errors[2]:R}");
        Assert.All(errors.Zip(errors.Skip(1)), static pair => Assert.InRange(Math.Log2(pair.First / pair.Second), 1.7, 2.3));
    }

    // A. Ogata and R. B. Banks, A solution of the differential equation of longitudinal dispersion in porous media, U.S. Geological Survey
    // Professional Paper 411-A, 1961: a front that enters a half-infinite pipe without loss.
    private static double Front(PipeRun pipe, double x, double time)
    {
        double spread = 2 * Math.Sqrt(pipe.Mixing * time);
        double shape = 0.5 * (SpecialFunctions.Erfc((x - pipe.Velocity * time) / spread)
            + Math.Exp(pipe.Velocity * x / pipe.Mixing) * SpecialFunctions.Erfc((x + pipe.Velocity * time) / spread));
        return pipe.GroundTemperature + (pipe.InletTemperature - pipe.GroundTemperature) * shape;
    }

    [Theory]
    [InlineData(800)]
    [InlineData(1200)]
    public void A_hot_front_travels_as_the_closed_form_says(double length)
    {
        double time = 0.4 * length / 0.8;
        double[] errors = [.. CellsOfFront.Select(cells =>
        {
            PipeRun pipe = new() { Cells = cells, Length = length, LossRate = 0, Mixing = 12 };
            double[] final = pipe.Simulate(time).FinalState;
            return final.Select((value, i) => Math.Abs(value - Front(pipe, (i + 0.5) * length / cells, time))).Max();
        })];

        Assert.True(errors[2] <= 0.2, $"{errors[2]:R}");
        Assert.All(errors.Zip(errors.Skip(1)), static pair => Assert.InRange(Math.Log2(pair.First / pair.Second), 1.6, 2.4));
    }

    [Theory]
    [InlineData(2)]
    [InlineData(10)]
    [InlineData(1000)]
    [InlineData(1_000_000)]
    public void The_Jacobian_is_tridiagonal_whatever_the_number_of_cells(int cells)
    {
        SparsityPattern pattern = DynamicSystem.Of(new PipeRun { Cells = cells }).Description.StateSparsity;

        Assert.Equal(EntriesOf(cells), pattern.EntryCount);
        for (int row = 0; row < cells; row++)
        {
            for (int entry = pattern.RowStarts[row]; entry < pattern.RowStarts[row + 1]; entry++)
                Assert.True(Math.Abs(pattern.Columns[entry] - row) <= 1);
        }
    }

    [Theory]
    [InlineData(10)]
    [InlineData(1000)]
    [InlineData(100_000)]
    public void Any_number_of_cells_runs_with_cells_of_the_same_length(int cells)
    {
        PipeRun pipe = new() { Cells = cells, Length = 10.0 * cells };
        Trajectory run = pipe.Simulate(until: 20);

        // Far from both ends nothing has arrived yet; near the inlet it has, the same for any long pipe.
        Assert.Equal(10, run.FinalState[^1], 0.01);
        Assert.Equal(run.FinalState[0], run[pipe.Temperature[0]].Final);
        Assert.InRange(run.FinalState[0], 40, 70);
    }

    [Fact]
    public void A_million_cells_are_described_in_room_for_their_Jacobian()
    {
        const int Cells = 1_000_000;
        PipeRun pipe = new() { Cells = Cells };
        long before = GC.GetAllocatedBytesForCurrentThread();
        DynamicSystem system = DynamicSystem.Of(pipe);
        long used = GC.GetAllocatedBytesForCurrentThread() - before;

        // Two patterns (entries and row starts, 4 bytes each), the model's own vector and two copies of the state, 8 bytes a cell each.
        long patterns = 4L * (EntriesOf(Cells) + Cells + 6 * Cells + Cells);
        Assert.True(used <= patterns + 3L * 8 * Cells + 100_000, $"{used} bytes");
        Assert.Equal("Temperature[999999]", system.Description.States[Cells - 1].Name);
        Assert.Equal(999_999, system.Description.IndexOfState("Temperature[999999]"));
        double[] rates = new double[Cells];
        system.Rates(0, system.InitialState, rates);
        Assert.True(rates[0] > 0 && rates[1] == 0 && Array.TrueForAll(rates, double.IsFinite));
    }

    [Fact]
    public void Every_number_means_what_it_says()
    {
        ModelDescription description = DynamicSystem.Of(new PipeRun { Cells = 3 }).Description;

        Assert.NotEqual("", description.TimeUnit);
        Assert.NotEqual("", description.Summary);
        Assert.All(description.States, static state => Assert.True(state is { Unit.Length: > 0, Summary.Length: > 0 } && double.IsFinite(state.Upper - state.Lower)));
        Assert.All(description.Parameters, static item => Assert.True(item is { Unit.Length: > 0, Summary.Length: > 0 } && double.IsFinite(item.Upper - item.Lower)));
    }

    [Fact]
    public void Lengths_are_fixed_when_a_pipe_is_made()
    {
        PipeRun pipe = new() { Cells = 5 };

        Assert.Throws<ArgumentOutOfRangeException>(static () => new PipeRun { Cells = 1 });
        Assert.Contains("5 elements", Assert.Throws<ArgumentException>(() => pipe.Temperature = new double[4]).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(static () => new PipeRun { Temperature = new double[4], Cells = 4 });
        Assert.Contains("Cells", Assert.Throws<ArgumentException>(() => DynamicSystem.Of(pipe).WithParameter(0, 6)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => pipe.Follow(static p => p.Cells, from: 5, to: 8));
        Assert.Throws<ArgumentNullException>(() => pipe.Temperature = null!);
    }

    [Fact]
    public void Elements_of_a_run_are_named_by_index()
    {
        PipeRun pipe = new() { Cells = 5 };
        Trajectory run = pipe.Simulate(until: 100);
        int k = 3;

        Assert.Equal(run.FinalState[3], run["Temperature[3]"].Final);
        Assert.Equal(run.FinalState[3], run[pipe.Temperature[3]].Final);
        Assert.Equal(run.FinalState[3], run[pipe.Temperature, k].Final);
        Assert.Equal(run.FinalState.Average(), run[pipe.MeanTemperature].Final, 1e-12);
        Assert.Throws<ArgumentException>(() => run[pipe.Temperature[k]]);
        Assert.Throws<KeyNotFoundException>(() => run["Temperature[5]"]);
        Assert.Throws<KeyNotFoundException>(() => run[pipe.Temperature, -1]);
    }

    [Fact]
    public void A_pipe_follows_its_own_copy_and_its_rest_is_stable_and_moves_with_the_inlet()
    {
        PipeRun pipe = new() { Cells = 10 };

        Equilibrium rest = Assert.Single(pipe.FindEquilibria().Equilibria);
        Assert.True(rest.IsStable);
        var branch = pipe.Follow(static p => p.InletTemperature, from: 70, to: 40);
        Assert.True(branch.Points[^1].State[0] < branch.Points[0].State[0]);
    }
}
