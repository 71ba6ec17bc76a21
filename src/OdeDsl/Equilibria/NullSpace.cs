namespace OdeDsl.Equilibria;

/// <summary>
/// Tells singular roots from regular ones. Rows of the Jacobian are measured against their size in a neighbourhood of the root, because a
/// row that vanishes at the root itself (a double root) has no size there.
/// </summary>
internal sealed class NullSpace(RootProblem problem)
{
    /// <summary>Singular values below this part of the largest may come from a continuum or a multiple root.</summary>
    private const double NearlySingular = 1e-6;

    /// <summary>A scaled Jacobian this close to singular is singular up to rounding.</summary>
    private const double SingularToRounding = 1e-13;

    /// <summary>The half width of the neighbourhood, in widths.</summary>
    private const double Neighbourhood = 0.01;

    /// <summary>Half the distance, in widths, within which two roots cannot be told from one double root.</summary>
    private const double DoubleRootReach = 1e-7;

    private readonly int n = problem.Size;
    private readonly MinimumNormSolver solver = new(problem.Scale);
    private readonly double[] jacobian = new double[problem.Size * problem.Size];
    private readonly double[] sizes = new double[problem.Size];
    private readonly double[] moved = new double[problem.Size];

    /// <summary>The null directions at a root, as steps of one width; empty if the root is regular.</summary>
    public double[][] Directions(ReadOnlySpan<double> root)
    {
        if (!Factor(root) || solver.SmallestSingularRatio() > NearlySingular) return [];
        double[][] directions = solver.NullVectors(NearlySingular);
        foreach (double[] direction in directions)
        {
            for (int i = 0; i < n; i++) direction[i] *= problem.Scale[i];
        }

        return directions;
    }

    /// <summary>
    /// Whether a root with null directions is a multiple one: the determinant changes sign within the reach, or the Jacobian is singular
    /// up to rounding.
    /// </summary>
    public bool IsMultiple(ReadOnlySpan<double> root, double[][] directions)
    {
        if (directions.Length == 0) return false;
        if (!Factor(root) || solver.SmallestSingularRatio() <= SingularToRounding) return true;
        foreach (double[] direction in directions)
        {
            if (SignAt(root, direction, DoubleRootReach) != SignAt(root, direction, -DoubleRootReach)) return true;
        }

        return false;
    }

    private bool Factor(ReadOnlySpan<double> root)
    {
        sizes.AsSpan().Clear();
        for (int k = 0; k < n; k++)
        {
            foreach (int side in (ReadOnlySpan<int>)[-1, 1])
            {
                root.CopyTo(moved);
                moved[k] += side * Neighbourhood * problem.Scale[k];
                GrowSizes(moved);
            }
        }

        GrowSizes(root);
        return solver.Factor(jacobian, sizes);
    }

    // Leaves the Jacobian of the point behind.
    private void GrowSizes(ReadOnlySpan<double> point)
    {
        problem.Differentiate(point, jacobian);
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double size = Math.Abs(jacobian[(i * n) + j]) * problem.Scale[j];
                if (double.IsFinite(size)) sizes[i] = Math.Max(sizes[i], size);
            }
        }
    }

    private int SignAt(ReadOnlySpan<double> root, double[] direction, double distance)
    {
        for (int i = 0; i < n; i++) moved[i] = root[i] + (distance * direction[i]);
        problem.Differentiate(moved, jacobian);
        return solver.Factor(jacobian) ? solver.DeterminantSign : 0;
    }
}
