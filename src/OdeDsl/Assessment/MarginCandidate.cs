namespace OdeDsl.Assessment;

/// <summary>A change of the set of attractors at one parameter value.</summary>
/// <param name="Event">What happens.</param>
/// <param name="Value">The parameter's value.</param>
/// <param name="Attractor">The attractor concerned.</param>
/// <param name="Text">What happens beyond, as a clause.</param>
/// <param name="Evidence">What was computed to say so.</param>
/// <param name="Frequency">The angular frequency at a Hopf point.</param>
/// <param name="Uncertainty">How accurate the value is.</param>
internal sealed record MarginCandidate(
    MarginEvent Event,
    double Value,
    string Attractor,
    string Text,
    string Evidence,
    double? Frequency = null,
    double Uncertainty = 0);
