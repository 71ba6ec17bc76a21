using OdeDsl.Integration;
using Xunit;

namespace OdeDsl.Tests.Integration;

/// <summary>The methods that tests run with.</summary>
internal static class TestMethods
{
    public static readonly IntegrationMethod[] Explicit =
        [IntegrationMethod.DormandPrince54, IntegrationMethod.Tsitouras54, IntegrationMethod.DormandPrince853];

    public static readonly IntegrationMethod[] Implicit =
    [
        IntegrationMethod.RadauIIA5, IntegrationMethod.RadauIIA9, IntegrationMethod.RadauIIA13, IntegrationMethod.RadauIIA,
        IntegrationMethod.Rodas4, IntegrationMethod.Rodas5P,
    ];

    /// <summary>The method of several steps too, which is exact on no parabola: it starts with order 1.</summary>
    public static TheoryData<IntegrationMethod> AllWithMultistep => [.. Explicit, .. Implicit, IntegrationMethod.BackwardDifferentiation, IntegrationMethod.Automatic];

    public static TheoryData<IntegrationMethod> All => [.. Explicit, .. Implicit, IntegrationMethod.Automatic];

    public static TheoryData<IntegrationMethod> AllForStiffMotion => [.. Implicit, IntegrationMethod.Automatic];

    public static TheoryData<IntegrationMethod> AllButAutomatic => [.. Explicit, .. Implicit];
}
