namespace Tarnwater.Tests;

/// <summary>Derivatives by central differences, extrapolated to a vanishing step (C. J. F. Ridders, Advances in Engineering Software 4, 1982).</summary>
internal static class Differences
{
    private const int Levels = 12;
    private const double Shrink = 1.6;

    public static double[] Extrapolated(Func<double, double[]> function, double step)
    {
        int count = function(0).Length;
        double[] best = new double[count], bestError = new double[count];
        Array.Fill(bestError, double.PositiveInfinity);
        double[][,] table = [.. Enumerable.Range(0, count).Select(static _ => new double[Levels, Levels])];
        for (int level = 0; level < Levels; level++, step /= Shrink)
        {
            double[] above = function(step), below = function(-step);
            for (int i = 0; i < count; i++)
            {
                table[i][0, level] = (above[i] - below[i]) / (2 * step);
                double factor = Shrink * Shrink;
                for (int order = 1; order <= level; order++, factor *= Shrink * Shrink)
                {
                    table[i][order, level] = (table[i][order - 1, level] * factor - table[i][order - 1, level - 1]) / (factor - 1);
                    double error = Math.Max(
                        Math.Abs(table[i][order, level] - table[i][order - 1, level]), Math.Abs(table[i][order, level] - table[i][order - 1, level - 1]));
                    if (error <= bestError[i]) (best[i], bestError[i]) = (table[i][order, level], error);
                }
            }
        }

        return best;
    }
}
