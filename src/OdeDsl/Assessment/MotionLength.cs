using OdeDsl.Integration;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Chooses over what time the integration methods are compared.</summary>
internal sealed class MotionLength(DynamicSystem system, CancellationToken cancellation)
{
    // Enough of the motion to tell methods apart, little enough to measure each setting in milliseconds.
    private const long Steps = 1500;

    // Over this many times the reciprocal of the largest exponent errors grow by e^5; beyond, they say nothing about a method.
    private const double SeparationTimes = 5;

    // When nothing is known of the motion: far beyond any time that the step limit lets through.
    private const double FarAhead = 1e12;

    /// <summary>The time of the working motion, as far as <see cref="Steps"/> steps at the default tolerance lead.</summary>
    public double For(MotionsAnswer motions)
    {
        double wanted = motions.Working.Duration > 0 ? motions.Working.Duration : FarAhead;
        if (motions.Working is { Kind: MotionKind.Irregular, Exponent: { } exponent })
            wanted = Math.Min(wanted, SeparationTimes / exponent.Value);
        try
        {
            return system.Simulate(wanted, new SimulationOptions { MaximumSteps = Steps, ManyNodes = true }, null, cancellation).EndTime;
        }
        catch (IntegrationException exception)
        {
            return exception.Time;
        }
    }
}
