using Xunit.Abstractions;

namespace OdeDsl.Generators.Tests.Vectors;

/// <summary>
/// Random models with vectors compile without warnings; their generated rates equal the compiled members bit for bit, and every derivative agrees
/// with differences. The compiler's own reading of the members is the independent interpreter.
/// </summary>
public sealed class RandomVectorModelTests(ITestOutputHelper output)
{
    private const int Count = 30;

    [Fact]
    public void Random_models_with_vectors_agree_with_their_own_members()
    {
        int seed = Environment.GetEnvironmentVariable("ODEDSL_SEED") is { } given ? int.Parse(given, System.Globalization.CultureInfo.InvariantCulture) : 20260101;
        output.WriteLine($"seeds {seed} to {seed + Count - 1}");
        string source = "using System;\nusing OdeDsl;\n" + string.Concat(Enumerable.Range(seed, Count).Select(RandomVectorModels.Make));
        VectorRun[] models = VectorRun.LoadAll(source);
        Assert.Equal(Count, models.Length);
        foreach (VectorRun model in models)
        {
            VectorChecks.All(model, seed);
            VectorChecks.All(model.With(("N", 13), ("R", 6)), seed + 1);
        }
    }
}
