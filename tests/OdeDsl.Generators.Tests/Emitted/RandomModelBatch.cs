using CsCheck;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>A random model, compiled.</summary>
internal sealed record RandomModel(ModelDefinition Definition, EmittedModel Emitted, ModelEquations Equations)
{
    public IEmittedCalls Calls => Emitted.Calls;
}

/// <summary>Where a random model is evaluated.</summary>
internal readonly record struct Point(double Time, double[] State, double[] Parameters)
{
    public const int Length = 1 + RandomModels.StateCount + RandomModels.ConstantCount;

    public static Point Of(double[] numbers) => new(
        numbers[0], numbers[1..(RandomModels.StateCount + 1)], numbers[(RandomModels.StateCount + 1)..]);

    public Interpreter Interpret(ExpressionGraph graph, double[]? regime = null) => new(graph, Time, State, Parameters, regime);
}

/// <summary>
/// Random models for all properties together, because compiling is what takes the time. A failure names the seed; set the
/// environment variable CsCheck_Seed to it to get the same models and points again.
/// </summary>
public sealed class RandomModelBatch
{
    private const int ModelCount = 90;

    private readonly RandomModel[] _models;
    private readonly string _seed;

    public RandomModelBatch()
    {
        PCG random = Environment.GetEnvironmentVariable("CsCheck_Seed") is { } given ? PCG.Parse(given) : new PCG((uint)Random.Shared.Next());
        _seed = random.ToString();
        ModelDefinition[] models = [.. Enumerable.Range(0, ModelCount).Select(i => RandomModels.Build("Random" + i, RandomModels.Recipe.Generate(random, null, out _)))];
        EmittedModel[] emitted = EmittedModel.OfMany(models);
        _models = [.. models.Select((model, i) => new RandomModel(model, emitted[i], ModelEquations.Of(model, CancellationToken.None)))];
    }

    /// <summary>Checks a property of every model at random points.</summary>
    internal void ForEach(Gen<double[]> numbers, int pointCount, Action<RandomModel, Point> check)
    {
        PCG random = PCG.Parse(_seed);
        foreach (RandomModel model in _models)
        {
            for (int i = 0; i < pointCount; i++)
            {
                double[] values = numbers.Generate(random, null, out _);
                try
                {
                    check(model, Point.Of(values));
                }
                catch (Exception fault)
                {
                    string point = string.Join(", ", values.Select(static value => value.ToString("R")));
                    throw new InvalidOperationException($"CsCheck_Seed={_seed}, time, states, parameters: {point}\n{fault.Message}\n{model.Emitted.Source}", fault);
                }
            }
        }
    }
}
