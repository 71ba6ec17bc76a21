namespace OdeDsl.Tests.Integration;

/// <summary>
/// Order conditions of Runge-Kutta methods by rooted trees: for each tree, Σ bᵢ Φᵢ = 1 / γ (J. C. Butcher; E. Hairer, S. P. Norsett, G. Wanner,
/// Solving ODEs I, section II.2, theorem 2.13).
/// </summary>
internal static class ButcherTrees
{
    /// <summary>A rooted tree: its subtrees at the root.</summary>
    public sealed record Tree(Tree[] Branches)
    {
        public int Order => 1 + Branches.Sum(static branch => branch.Order);

        public double Gamma => Order * Branches.Aggregate(1.0, static (product, branch) => product * branch.Gamma);

        /// <summary>The elementary weights Φᵢ of the stages.</summary>
        /// <param name="a">The matrix of the method.</param>
        /// <param name="single">The matrix for a node with one branch; the same but for Rosenbrock methods.</param>
        public double[] StageWeights(double[,] a, double[,] single)
        {
            int stages = a.GetLength(0);
            double[,] here = Branches.Length == 1 ? single : a;
            double[] weights = [.. Enumerable.Repeat(1.0, stages)];
            foreach (Tree branch in Branches)
            {
                double[] inner = branch.StageWeights(a, single);
                for (int i = 0; i < stages; i++)
                {
                    double sum = 0;
                    for (int j = 0; j < stages; j++) sum += here[i, j] * inner[j];
                    weights[i] *= sum;
                }
            }

            return weights;
        }
    }

    /// <summary>All trees of an order: 1, 1, 2, 4, 9, ... of them.</summary>
    public static IEnumerable<Tree> OfOrder(int order) => Forests(order - 1, order - 1).Select(static forest => new Tree(forest));

    /// <summary>The largest misfit Σ bᵢ Φᵢ − θ^order / γ over all trees up to an order.</summary>
    public static double LargestMisfit(double[,] a, double[] b, int order, double theta = 1) => LargestMisfit(a, a, b, order, theta);

    /// <summary>
    /// The same for a Rosenbrock method, whose nodes with one branch take the matrix β = α + Γ (E. Hairer, G. Wanner, Solving ODEs II,
    /// section IV.7, equation 7.11 and the rule before it).
    /// </summary>
    public static double LargestMisfit(double[,] alpha, double[,] beta, double[] b, int order, double theta = 1) =>
        Enumerable.Range(1, order).SelectMany(OfOrder).Max(tree =>
            Math.Abs(b.Zip(tree.StageWeights(alpha, beta), static (x, y) => x * y).Sum() - Math.Pow(theta, tree.Order) / tree.Gamma));

    // Multisets of trees with a given total order and no tree larger than a limit: largest first.
    private static IEnumerable<Tree[]> Forests(int total, int largest)
    {
        if (total == 0)
        {
            yield return [];
            yield break;
        }

        for (int order = Math.Min(total, largest); order >= 1; order--)
        {
            Tree[] candidates = [.. OfOrder(order)];
            for (int count = total / order; count >= 1; count--)
            {
                foreach (Tree[] chosen in Multisets(candidates, count, 0))
                {
                    foreach (Tree[] rest in Forests(total - count * order, order - 1)) yield return [.. chosen, .. rest];
                }
            }
        }
    }

    private static IEnumerable<Tree[]> Multisets(Tree[] candidates, int count, int from)
    {
        if (count == 0)
        {
            yield return [];
            yield break;
        }

        for (int i = from; i < candidates.Length; i++)
        {
            foreach (Tree[] rest in Multisets(candidates, count - 1, i)) yield return [candidates[i], .. rest];
        }
    }
}
