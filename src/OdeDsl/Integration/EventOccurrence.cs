using System.Collections.Immutable;
using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>An event that happened during a run.</summary>
/// <param name="Time">The time.</param>
/// <param name="Event">The index into <see cref="ModelDescription.Events"/>.</param>
/// <param name="Before">The state in which the motion arrived.</param>
/// <param name="After">The state after the action.</param>
/// <param name="Modes">The modes after the action.</param>
public sealed record EventOccurrence(
    double Time, int Event, ImmutableArray<double> Before, ImmutableArray<double> After, ImmutableArray<double> Modes);
