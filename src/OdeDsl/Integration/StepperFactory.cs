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
        var field = new ModelField<TSystem>(system, regime, sliding);
        return tangentCount == 0 ? Make(field) : Make(new VariationalField<ModelField<TSystem>>(field, tangentCount));
    }

    private Stepper Make<TField>(TField field)
        where TField : struct, IVectorField =>
        method switch
        {
            IntegrationMethod.DormandPrince54 => Explicit(field, DormandPrince54Tableau.Instance),
            IntegrationMethod.Tsitouras54 => Explicit(field, Tsitouras54Tableau.Instance),
            IntegrationMethod.DormandPrince853 => Explicit(field, DormandPrince853Tableau.Instance),
            IntegrationMethod.Rodas4 => Linear(field, Rodas4Tableau.Instance),
            IntegrationMethod.Rodas5P => Linear(field, Rodas5PTableau.Instance),
            IntegrationMethod.BackwardDifferentiation => new BackwardDifferentiation<TField>(field, norm, statistics),
            IntegrationMethod.RadauIIA5 => Radau(field, RadauOrder.Fixed(RadauCoefficients.Three)),
            IntegrationMethod.RadauIIA9 => Radau(field, RadauOrder.Fixed(RadauCoefficients.Five)),
            IntegrationMethod.RadauIIA13 => Radau(field, RadauOrder.Fixed(RadauCoefficients.Seven)),
            _ => Radau(field, RadauOrder.Variable(norm.Relative)),
        };

    private ExplicitRungeKutta<TField> Explicit<TField>(TField field, ExplicitTableau tableau)
        where TField : struct, IVectorField => new(field, tableau, norm, statistics);

    private RadauIIA<TField> Radau<TField>(TField field, RadauOrder order, IntegrationMethod? name = null)
        where TField : struct, IVectorField => new(field, name ?? method, order, norm, statistics);

    // A Rosenbrock method for tangents would need the second derivatives of the rates: they go with a Radau IIA method, whose iteration does not.
    private Stepper Linear<TField>(TField field, RosenbrockTableau tableau)
        where TField : struct, IVectorField =>
        field.Dimension == field.BlockSize
            ? new Rosenbrock<TField>(field, tableau, norm, statistics)
            : Radau(field, RadauOrder.Variable(norm.Relative), IntegrationMethod.RadauIIA);
}
