using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>Binding signals to the inputs of a model.</summary>
public static class InputExtensions
{
    /// <summary>
    /// The model's equations with a signal in place of an input's constant value, to simulate: <c>sump.WithInput(nameof(sump.Inflow),
    /// Signal.Steps([0, 600], [0.1, 0.3])).Simulate(until: 1200)</c>.
    /// </summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model, with the numbers it holds now.</param>
    /// <param name="input">The name of the input, by <see langword="nameof"/>.</param>
    /// <param name="signal">The signal.</param>
    /// <returns>The system; the model itself is not changed.</returns>
    /// <exception cref="ArgumentException">There is no such input; the message lists those there are.</exception>
    public static DynamicSystem WithInput<TModel, TSystem>(this IOdeModel<TModel, TSystem> model, string input, Signal signal)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        DynamicSystem.Of(model).WithInput(input, signal);
}
