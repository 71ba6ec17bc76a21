using System.Collections.Immutable;
using System.Globalization;

namespace OdeDsl.Equilibria;

/// <summary>The equilibria a search found, and what the search did: evidence of thoroughness, not a proof of completeness.</summary>
public sealed record EquilibriumSearchResult
{
    /// <summary>The distinct equilibria, in ascending order of their states.</summary>
    public required ImmutableArray<Equilibrium> Equilibria { get; init; }

    /// <summary>The lower corner of the region the starts were spread over.</summary>
    public required ImmutableArray<double> Lower { get; init; }

    /// <summary>The upper corner of the region the starts were spread over.</summary>
    public required ImmutableArray<double> Upper { get; init; }

    /// <summary>The number of starts.</summary>
    public required int Starts { get; init; }

    /// <summary>The number of starts that ended on an equilibrium inside the state bounds.</summary>
    public required int Landed { get; init; }

    /// <summary>The number of starts that ended on a root outside the state bounds or of a formula that does not hold there.</summary>
    public required int Rejected { get; init; }

    /// <summary>The number of the start (from 1) that found the last new equilibrium; 0 if none was found.</summary>
    public required int LastNewStart { get; init; }

    /// <summary>
    /// The share of landings expected on equilibria not seen yet: the number of equilibria met once over the number of landings
    /// (I. J. Good, Biometrika 40, 1953, equation 9); 1 if no start landed.
    /// </summary>
    public required double UnseenShare { get; init; }

    /// <summary>
    /// The number of regimes whose formulas were searched one by one; 0 if there were too many and starts kept to their own.
    /// </summary>
    public required int RegimesSearched { get; init; }

    /// <summary>The number of switching surfaces searched for rests by sliding.</summary>
    public required int SurfacesSearched { get; init; }

    /// <summary>What was searched and how much that says, in one paragraph.</summary>
    public string Completeness
    {
        get
        {
            string regimes = RegimesSearched switch
            {
                0 => "along the regimes of the starts",
                1 => "in the only regime met",
                _ => string.Create(CultureInfo.InvariantCulture, $"in {RegimesSearched} regimes"),
            };
            string last = LastNewStart == 0
                ? "None found an equilibrium."
                : string.Create(
                    CultureInfo.InvariantCulture,
                    $"The last new one was found by start {LastNewStart}; the share of landings unseen is estimated at {UnseenShare:P1}.");
            string surfaces = SurfacesSearched == 0
                ? ""
                : string.Create(CultureInfo.InvariantCulture, $" Switching surfaces searched for rests by sliding, one at a time: {SurfacesSearched}.");
            string noun = Equilibria.Length == 1 ? "equilibrium" : "equilibria";
            string landed = string.Create(
                CultureInfo.InvariantCulture,
                $"{Starts} starts {regimes}: {Landed} ended on {Equilibria.Length} {noun} inside the bounds.");
            return $"{landed} {last}{surfaces} This is evidence, not a proof that there are no others.";
        }
    }
}
