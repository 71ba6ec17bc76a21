namespace OdeDsl.Package.Tests;

/// <summary>All tests share one place and run one after the other: each keeps the whole machine busy.</summary>
[CollectionDefinition(Name)]
public sealed class Packed : ICollectionFixture<Workplace>
{
    public const string Name = "Packed";
}
