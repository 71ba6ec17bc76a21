namespace OdeDsl;

/// <summary>Which crossings of a guard count as an event.</summary>
public enum GuardDirection
{
    /// <summary>From below zero to above; of a condition: it begins to hold.</summary>
    Rising,

    /// <summary>From above zero to below; of a condition: it ceases to hold.</summary>
    Falling,

    /// <summary>Both.</summary>
    Both,
}
