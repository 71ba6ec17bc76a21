using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Equilibria;

/// <summary>Checks the starts a caller gives.</summary>
internal static class SearchStarts
{
    /// <summary>Throws unless each start has one finite value per state.</summary>
    public static void Require(DynamicSystem system, ImmutableArray<ImmutableArray<double>> starts, string name)
    {
        for (int k = 0; k < starts.Length; k++)
        {
            if (starts[k].Length != system.StateCount)
            {
                throw new ArgumentException(
                    $"Extra start {k} has {starts[k].Length} values; {system.Description.Name} has {system.StateCount} states.", name);
            }

            if (!starts[k].All(double.IsFinite)) throw new ArgumentException($"Extra start {k} holds a value that is not finite.", name);
        }
    }
}
