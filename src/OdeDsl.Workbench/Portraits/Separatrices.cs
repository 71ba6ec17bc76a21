using OdeDsl.Assessment;
using OdeDsl.Equilibria;

namespace OdeDsl.Workbench.Portraits;

/// <summary>The four curves of a planar saddle: two that lead into it and two that leave it.</summary>
/// <param name="assessment">What was found about the model.</param>
/// <param name="tracer">Computes its motions.</param>
/// <param name="lower">The lower corner of the region shown.</param>
/// <param name="upper">The upper corner.</param>
/// <param name="cycles">States along the limit cycles: a curve that has wound onto one of them has nothing more to show.</param>
internal sealed class Separatrices(
    ModelAssessment assessment, MotionTracer tracer, double[] lower, double[] upper, IReadOnlyList<double[]> cycles)
{
    // The curves start this share of the region's size away from the saddle, along its eigenvectors.
    private const double Offset = 1e-4;

    // Curves end this close to another rest, as a share of the region.
    private const double Near = 5e-3;

    // Curves that wind onto a cycle or into a focus are followed for that many turns.
    private const double Turns = 6;

    /// <param name="saddle">The saddle.</param>
    /// <param name="into">The curves that lead into it (computed in reversed time) or those that leave it.</param>
    /// <returns>Lines of states in the direction of motion.</returns>
    public IReadOnlyList<List<double[]>> Of(Equilibrium saddle, bool into)
    {
        double eigenvalue = saddle.Eigenvalues.Select(static value => value.Real).FirstOrDefault(value => value < 0 == into);
        if (eigenvalue == 0 || saddle.Eigenvalues.Any(static value => value.Imaginary != 0)) return [];
        double[] direction = Eigenvector(saddle.Jacobian, eigenvalue);
        double duration = (into ? -1 : 1) * (2 * Math.Log(1 / Offset) / Math.Abs(eigenvalue) + Turns * LongestTurn());
        List<List<double[]>> lines = [];
        foreach (int side in (int[])[-1, 1])
        {
            double[] start = [.. saddle.State.Select((value, i) => value + side * Offset * direction[i])];
            List<double[]> line = tracer.FollowUntil(start, duration, state => IsOutside(state) || IsNearOther(state, saddle) || IsOnCycle(state));
            line.Insert(0, [.. saddle.State]);
            if (into) line.Reverse();
            lines.Add(line);
        }

        return lines;
    }

    /// <summary>The eigenvector of a real eigenvalue of a 2×2 matrix, one region in size.</summary>
    private double[] Eigenvector(IReadOnlyList<double> jacobian, double eigenvalue)
    {
        double[] first = [jacobian[1], eigenvalue - jacobian[0]], second = [eigenvalue - jacobian[3], jacobian[2]];
        double[] vector = Size(first) >= Size(second) ? first : second;
        double size = Size(vector);
        return [vector[0] / size, vector[1] / size];
    }

    private double Size(double[] vector) => Math.Sqrt(vector.Select((value, i) => Math.Pow(value / (upper[i] - lower[i]), 2)).Sum());

    private double LongestTurn()
    {
        IEnumerable<double> modes = assessment.Rests.Equilibria.SelectMany(static rest => rest.Modes).Select(static mode => mode.Period);
        IEnumerable<double> cycles = assessment.Motions.Cycles.Select(static cycle => cycle.Period);
        return modes.Concat(cycles).Where(double.IsFinite).DefaultIfEmpty(0).Max();
    }

    /// <summary>Whether a state is well outside the region. Angles never are: they turn.</summary>
    private bool IsOutside(double[] state)
    {
        for (int i = 0; i < state.Length; i++)
        {
            if (assessment.Description.States[i].AnglePeriod is not null) continue;
            double slack = 0.3 * (upper[i] - lower[i]);
            if (!(state[i] >= lower[i] - slack && state[i] <= upper[i] + slack)) return true;
        }

        return false;
    }

    private bool IsNearOther(double[] state, Equilibrium saddle) => assessment.Rests.Equilibria.Any(rest => rest != saddle && Distance(state, rest.State) <= Near);

    private bool IsOnCycle(double[] state) => cycles.Any(point => Distance(state, point) <= Near);

    private double Distance(double[] state, IReadOnlyList<double> rest)
    {
        double[] difference = new double[state.Length];
        for (int i = 0; i < state.Length; i++)
        {
            double gap = state[i] - rest[i];
            difference[i] = assessment.Description.States[i].AnglePeriod is { } period ? Math.IEEERemainder(gap, period) : gap;
        }

        return Size(difference);
    }
}
