using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>Makes a method for a system, with the system's equations compiled in.</summary>
internal sealed class StepperFactory(
    IntegrationMethod method, double[] regime, SlidingSurface sliding, int tangentCount, ErrorNorm norm, IntegrationStatistics statistics)
    : ISystemOperation<Stepper>
{
    public Stepper Run<TSystem>(DynamicSystem system)
        where TSystem : struct, IOdeSystem
    {
        var field = new ModelField<TSystem>(system.StateCount, system.Parameters.ToArray(), regime, sliding);
        return tangentCount == 0 ? Make(field) : Make(new VariationalField<ModelField<TSystem>>(field, tangentCount));
    }

    private Stepper Make<TField>(TField field)
        where TField : struct, IVectorField =>
        method switch
        {
            IntegrationMethod.DormandPrince54 => new DormandPrince54<TField>(field, norm, statistics),
            _ => new RadauIIA5<TField>(field, norm.ForEstimateOfOrderThree(), statistics),
        };
}
