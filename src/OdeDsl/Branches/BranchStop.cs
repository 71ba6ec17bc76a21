namespace OdeDsl.Branches;

/// <summary>A place within a step where the branch must stop: a bound, or a switching surface.</summary>
/// <param name="Along">How far along the step it lies.</param>
/// <param name="Point">The corrected point there.</param>
/// <param name="Parameter">The parameter's value where it is a bound, free of rounding; otherwise <see langword="null"/>.</param>
/// <param name="End">What is reached.</param>
/// <param name="Text">What is reached, as one sentence.</param>
/// <param name="Switches">For a surface: the switching functions that vanish there, with the regime entries beyond.</param>
internal sealed record BranchStop(
    double Along, CurvePoint Point, double? Parameter, BranchEnd End, string Text, IReadOnlyList<(int Index, double Entry)> Switches);
