namespace OdeDsl.Assessment;

/// <summary>The part of an assessment being worked on.</summary>
public enum AssessmentStage
{
    /// <summary>Where the system rests.</summary>
    Rests,

    /// <summary>Its limit cycles and families of closed orbits.</summary>
    Cycles,

    /// <summary>What its motions do.</summary>
    Motions,

    /// <summary>How far the parameters stand from a change.</summary>
    Margins,

    /// <summary>Which integration method fits.</summary>
    Methods,
}
