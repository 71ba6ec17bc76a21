namespace OdeDsl.Equilibria;

/// <summary>
/// Pushes Newton's method away from roots already known: the equations are multiplied by m(x) = Π (1/‖x - r‖² + 1)
/// (P. E. Farrell, Á. Birkisson and S. W. Funke, SIAM J. Sci. Comput. 37, 2015, shifted deflation with power 2 and shift 1).
/// Distances are in widths of the region; for angles the chord of the circle, so that a root is one root modulo its period.
/// </summary>
internal sealed class Deflation(SearchRegion region)
{
    private readonly List<double[]> roots = [];

    public int Count => roots.Count;

    public void Add(ReadOnlySpan<double> root) => roots.Add(root[..region.Count].ToArray());

    /// <summary>The logarithm of m.</summary>
    public double Logarithm(ReadOnlySpan<double> state)
    {
        double sum = 0;
        foreach (double[] root in roots) sum += Math.Log(1 + (1 / SquaredDistance(state, root)));
        return sum;
    }

    /// <summary>The derivative of ln m in a direction: (∇m · direction) / m.</summary>
    public double Derivative(ReadOnlySpan<double> state, ReadOnlySpan<double> direction)
    {
        double sum = 0;
        foreach (double[] root in roots)
        {
            double squared = SquaredDistance(state, root);
            double slope = 0;
            for (int i = 0; i < region.Count; i++) slope += SlopeOfSquare(i, state[i], root[i]) * direction[i];
            // d/dx ln(1 + 1/q) = -q' / (q (1 + q))
            sum -= slope / (squared * (1 + squared));
        }

        return sum;
    }

    private double SquaredDistance(ReadOnlySpan<double> state, double[] root)
    {
        double sum = 0;
        for (int i = 0; i < region.Count; i++)
        {
            double d = Chord(i, state[i], root[i]);
            sum += d * d;
        }

        return sum;
    }

    private double Chord(int i, double a, double b)
    {
        double period = region.Periods[i];
        double length = period > 0 ? period / Math.PI * Math.Sin(Math.PI / period * (a - b)) : a - b;
        return length / region.Width[i];
    }

    private double SlopeOfSquare(int i, double a, double b)
    {
        double period = region.Periods[i];
        double slope = period > 0 ? Math.Cos(Math.PI / period * (a - b)) : 1;
        return 2 * Chord(i, a, b) * slope / region.Width[i];
    }
}
