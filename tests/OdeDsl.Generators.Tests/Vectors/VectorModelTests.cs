using OdeDsl.Modeling;

namespace OdeDsl.Generators.Tests.Vectors;

/// <summary>Models with vectors: generated rates are the user's own to the bit, and derivatives are those of the rates.</summary>
public sealed class VectorModelTests
{
    private const string Neighbours = """
        [OdeModel] public sealed partial class Neighbours
        {
            [Parameter(7)] public partial int Cells { get; init; }
            [State(Length = nameof(Cells), Initial = 1)] public partial double[] T { get; set; }
            [Parameter(0.4)] public partial double Rate { get; set; }
            [Rate(nameof(T))] private double TRate(int i) =>
                i == 0 ? Math.Sin(T[1]) - T[0] * T[0] : i == Cells - 1 ? T[i - 1] * Rate - T[i] : Rate * (T[i - 1] - 2 * T[i] + T[i + 1]) / T[i];
        }
        """;

    private const string Ring = """
        [OdeModel] public sealed partial class Ring
        {
            [Parameter(6)] public partial int Cells { get; init; }
            [State(Length = nameof(Cells))] public partial double[] U { get; set; }
            [Rate(nameof(U))] private double URate(int i) => U[(i + 1) % Cells] * U[i] - U[i == 0 ? Cells - 1 : i - 1];
        }
        """;

    private const string Mixed = """
        [OdeModel] public sealed partial class Mixed
        {
            [Parameter(5)] public partial int Cells { get; init; }
            [State(Length = nameof(Cells), Initial = 2)] public partial double[] U { get; set; }
            [State(Initial = 1)] public partial double Level { get; set; }
            [State(Length = nameof(Cells))] public partial double[] V { get; set; }
            [Parameter(0.7, Length = nameof(Cells))] public partial double[] Weight { get; set; }
            [Parameter(3)] public partial double P { get; set; }

            private double Mean(double[] vector)
            {
                double sum = 0;
                for (int k = 0; k < vector.Length; k++) sum += vector[k] * Weight[k];
                return sum / vector.Length;
            }

            [Rate(nameof(Level))] private double LevelRate(double time) => Mean(U) * Math.Cos(time) - Level * V[^1];
            [Rate(nameof(U))] private double URate(int i, double time) => V[i] * Level + Weight[i] * P - Math.Exp(-U[i]) * time;
            [Rate(nameof(V))] private double VRate(int cell) => Mean(V) * Mean(U) - V[cell] * (cell + 0.5) / Cells + V[Math.Min(cell + 1, Cells - 1)];
            [Observable] private double Total => Mean(U) + Mean(V) * Level;
        }
        """;

    private const string Plate = """
        [OdeModel] public sealed partial class Plate
        {
            [Parameter(4)] public partial int Rows { get; init; }
            [Parameter(5)] public partial int Columns { get; init; }
            [State(Rows = nameof(Rows), Columns = nameof(Columns), Initial = 1)] public partial double[,] T { get; set; }
            [Parameter(2)] public partial double D { get; set; }
            [Rate(nameof(T))] private double TRate(int i, int j)
            {
                double north = i == 0 ? 0 : T[i - 1, j];
                double south = i == Rows - 1 ? 1 : T[i + 1, j];
                double west = j > 0 ? T[i, j - 1] : T[i, j];
                double east = j < Columns - 1 ? T[i, j + 1] : T[i, j];
                return D * (north + south + west + east - 4 * T[i, j]) + T[i, j] * T[i, j];
            }
            [Observable] private double Mean
            {
                get
                {
                    double sum = 0;
                    for (int i = 0; i < Rows; i++)
                        for (int j = 0; j < Columns; j++)
                            sum += T[i, j];
                    return sum / (Rows * (double)Columns);
                }
            }
        }
        """;

    private const string Switched = """
        [OdeModel] public sealed partial class Switched
        {
            [Parameter(6)] public partial int Cells { get; init; }
            [State(Length = nameof(Cells))] public partial double[] H { get; set; }
            [State] public partial double Tank { get; set; }
            private double Over(int k) => Math.Max(H[k] - 1, 0);
            [Rate(nameof(H))] private double HRate(int i) =>
                (i == 0 ? Math.Abs(Tank - 0.8) : Over(i - 1)) - Over(i) * (H[i] > Tank ? 1.5 : Math.Sqrt(H[i]));
            [Rate(nameof(Tank))] private double TankRate
            {
                get
                {
                    double sum = 0;
                    for (int k = 0; k < Cells; k++) { if (H[k] > 0.9) sum += H[k]; else sum -= Math.Abs(H[k] - 0.5) * 0.5; }
                    return sum - Tank;
                }
            }
        }
        """;

    private const string Distances = """
        [OdeModel] public sealed partial class Distances
        {
            [Parameter(6)] public partial int Count { get; init; }
            [State(Length = nameof(Count))] public partial double[] Phase { get; set; }
            [Parameter(1, Rows = nameof(Count), Columns = nameof(Count))] public partial double[,] Coupling { get; set; }
            [Rate(nameof(Phase))] private double PhaseRate(int i)
            {
                double pull = 0.1 * i;
                for (int k = 0; k < Phase.Length; k++) pull += Coupling[i, k] * Math.Sin(Phase[k] - Phase[i]);
                return pull / Count;
            }
        }
        """;

    private const string Bands = """
        [OdeModel] public sealed partial class Bands
        {
            [Parameter(9)] public partial int N { get; init; }
            [State(Length = nameof(N))] public partial double[] X { get; set; }
            [State(Length = 4)] public partial double[] Y { get; set; }
            [Rate(nameof(X))] private double XRate(int i) => i switch
            {
                0 => X[0] * X[N - 1],
                1 or 2 => X[i - 1] - X[i],
                _ when i >= N - 2 => X[0] - X[i],
                _ => X[i - 2] * X[0] + X[i + 2] * Y[0] + Triangle(i),
            };
            private double Triangle(int i)
            {
                double sum = X[i];
                for (int k = 0; k < i; k++) sum += X[k] * 0.125;
                return sum;
            }
            [Rate(nameof(Y))] private double YRate(int i)
            {
                double sum = 0;
                for (int k = 0; k < 4; k++) sum += Y[k];
                return X[i] - sum * Y[3 - i];
            }
        }
        """;

    public static TheoryData<string, int[]> Models => new()
    {
        { Neighbours, [2, 3, 7, 40] },
        { Ring, [3, 4, 6, 11] },
        { Mixed, [2, 5, 12] },
        { Plate, [3, 5] },
        { Switched, [2, 6, 9] },
        { Distances, [1, 2, 6] },
        { Bands, [7, 9, 15] },
    };

    [Theory]
    [MemberData(nameof(Models))]
    public void Rates_are_the_users_own_and_derivatives_are_theirs(string source, int[] lengths)
    {
        VectorRun model = VectorRun.Load(source);
        string[] names = [.. Enumerable.Range(0, model.System.Description.Parameters.ScalarCount)
            .Select(i => model.System.Description.Parameters[i]).Where(static parameter => parameter.IsFixed).Select(static parameter => parameter.Name)];
        foreach (int length in lengths)
        {
            VectorRun run = model.With([.. names.Select((name, i) => (name, length + i))]);
            for (int seed = 0; seed < 3; seed++) VectorChecks.All(run, seed);
        }
    }
}
