namespace OdeDsl.Integration;

/// <summary>Which methods the automatic choice works with: those that were fastest at a tolerance on the public problems (benchmarks/work-precision.md).</summary>
internal static class AutomaticChoice
{
    /// <summary>The method for motion that is not stiff.</summary>
    public static IntegrationMethod Explicit(IntegrationOptions options) =>
        options.ManyNodes ? IntegrationMethod.DormandPrince54
        : options.RelativeTolerance > 3e-4 ? IntegrationMethod.Tsitouras54
        : IntegrationMethod.DormandPrince853;

    /// <summary>The method for stiff motion.</summary>
    public static IntegrationMethod Implicit(IntegrationOptions options) =>
        options.ManyNodes ? IntegrationMethod.RadauIIA5
        : options.RelativeTolerance > 3e-5 ? IntegrationMethod.Rodas4
        : options.RelativeTolerance > 3e-8 ? IntegrationMethod.Rodas5P
        : IntegrationMethod.RadauIIA;
}
