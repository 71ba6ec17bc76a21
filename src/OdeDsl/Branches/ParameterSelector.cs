using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>Finds which parameter a selector such as <c>tank =&gt; tank.TankArea</c> reads, by reading copies with distinct marker values.</summary>
internal static class ParameterSelector
{
    // Several sets of markers, of either sign, small and large, rising and falling: a selector that computes or chooses something would
    // have to hit the same parameter's marker in all of them.
    private static readonly (double First, double Step)[] MarkerSets =
        [(1.375, 0.8125), (-211.5, -3.28125), (1.75e9, 3.5e6), (-2.5e9, 1.25e6), (3e-9, 7e-12), (6.5e6, -1.5e3)];

    // Far below what any condition is about, far above rounding.
    private const double OwnValueMove = 1e-9;

    /// <summary>The index of the selected parameter.</summary>
    /// <exception cref="ArgumentException">The selector does not return one of the model's parameters unchanged.</exception>
    public static int IndexOf<TModel, TSystem>(IOdeModel<TModel, TSystem> model, Func<TModel, double> selector)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        int[] found = [.. MarkerSets.Select(markers => Probe(model, selector, markers)).Append(ProbeAtOwnValues(model, selector)).Distinct()];
        if (found is [>= 0 and int index]) return index;
        string names = string.Join(", ", Names(TSystem.Description));
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
        double[] parameters = new double[model.ParameterCount];
        model.ReadParameters(parameters);
        for (int i = 0; i < parameters.Length; i++)
        {
            if (!IsFixed<TSystem>(i)) parameters[i] = markers.First + i * markers.Step;
        }

        return Probe(model, selector, parameters);
    }

    // The model's own values, each moved by another small part, so that conditions on them hold as they do in the model.
    private static int ProbeAtOwnValues<TModel, TSystem>(IOdeModel<TModel, TSystem> model, Func<TModel, double> selector)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        double[] parameters = new double[model.ParameterCount];
        model.ReadParameters(parameters);
        for (int i = 0; i < parameters.Length; i++)
        {
            if (!IsFixed<TSystem>(i)) parameters[i] = parameters[i] * (1 + (i + 1) * OwnValueMove) + (i + 1) * OwnValueMove * OwnValueMove;
        }

        return Probe(model, selector, parameters);
    }

    private static int Probe<TModel, TSystem>(IOdeModel<TModel, TSystem> model, Func<TModel, double> selector, double[] parameters)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem
    {
        TModel copy = model.Copy();
        copy.WriteParameters(parameters);
        // States are no parameters: a selector that reads one gets a value that equals no marker.
        double[] state = new double[model.StateCount];
        Array.Fill(state, double.NaN);
        copy.WriteState(state);
        double value = selector(copy);
        int found = Array.IndexOf(parameters, value);
        return found >= 0 && IsFixed<TSystem>(found) ? -1 : found;
    }

    // Lengths of vectors come before the vectors, whose elements' positions depend on them.
    private static bool IsFixed<TSystem>(int index)
        where TSystem : struct, IOdeSystem =>
        index < TSystem.Description.Parameters.ScalarCount && TSystem.Description.Parameters[index].IsFixed;

    // The vectors by their names, not all their elements.
    private static IEnumerable<string> Names(ModelDescription description) =>
    [
        .. Enumerable.Range(0, description.Parameters.ScalarCount).Select(i => description.Parameters[i]).Where(static item => !item.IsFixed).Select(static item => item.Name),
        .. description.ParameterVectors.Select(static vector => vector.Name + "[...]"),
    ];
}
