namespace OdeDsl.Assessment;

/// <summary>How far an assessment has come.</summary>
/// <param name="Stage">The part being worked on.</param>
/// <param name="Fraction">The share done of the whole assessment, 0 to 1; never decreases.</param>
/// <param name="Detail">What is being done, in a few words.</param>
public readonly record struct AssessmentProgress(AssessmentStage Stage, double Fraction, string Detail);
