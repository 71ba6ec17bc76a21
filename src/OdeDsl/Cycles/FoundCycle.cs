namespace OdeDsl.Cycles;

/// <summary>A limit cycle with what it was made from.</summary>
internal sealed record FoundCycle(LimitCycle Cycle, ShotOrbit Orbit, OrbitTrace Trace);
