using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>Finds which parameter a selector such as <c>tank =&gt; tank.TankArea</c> reads, by reading copies with distinct marker values.</summary>
internal static class ParameterSelector
{
    // Two sets of markers: a selector that computes something would have to hit the same parameter's marker in both.
    private static readonly (double First, double Step)[] MarkerSets = [(1.375, 0.8125), (-211.5, -3.28125)];

    /// <summary>The index of the selected parameter.</summary>
    /// <exception cref="ArgumentException">The selector does not return one of the model's parameters unchanged.</exception>
    public static int IndexOf<TModel, TSystem>(IOdeModel<TModel, TSystem> model, Func<TModel, double> selector)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        int found = Probe(model, selector, MarkerSets[0]);
        if (found >= 0 && Probe(model, selector, MarkerSets[1]) == found) return found;
        string names = string.Join(", ", TSystem.Description.Parameters.Select(static parameter => parameter.Name));
        throw new ArgumentException(
            names.Length == 0
                ? $"The model {TSystem.Description.Name} has no parameters to follow."
                : $"The selector must return one parameter of {TSystem.Description.Name} unchanged, as in model => model.Name; the parameters are {names}.",
            nameof(selector));
    }

    private static int Probe<TModel, TSystem>(
        IOdeModel<TModel, TSystem> model, Func<TModel, double> selector, (double First, double Step) markers)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        TModel copy = model.Copy();
        double[] parameters = new double[TSystem.Description.Parameters.Length];
        for (int i = 0; i < parameters.Length; i++) parameters[i] = markers.First + i * markers.Step;
        copy.WriteParameters(parameters);
        // States are no parameters: a selector that reads one gets a value that equals no marker.
        double[] state = new double[TSystem.Description.States.Length];
        Array.Fill(state, double.NaN);
        copy.WriteState(state);
        double value = selector(copy);
        return Array.IndexOf(parameters, value);
    }
}
