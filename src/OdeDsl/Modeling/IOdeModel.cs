namespace OdeDsl.Modeling;

/// <summary>What the generator adds to a model class: access to its numbers as vectors. Implemented explicitly, out of the user's way.</summary>
/// <typeparam name="TModel">The model class itself.</typeparam>
/// <typeparam name="TSystem">Its generated equations.</typeparam>
public interface IOdeModel<TModel, TSystem>
    where TModel : class, IOdeModel<TModel, TSystem>
    where TSystem : struct, IOdeSystem
{
    /// <summary>The number of states, n: it depends on the lengths of vectors.</summary>
    int StateCount => TSystem.Description.States.Length;

    /// <summary>The number of parameters, m.</summary>
    int ParameterCount => TSystem.Description.Parameters.Length;

    /// <summary>Copies the model's states out.</summary>
    /// <param name="state">Receives n values.</param>
    void ReadState(Span<double> state);

    /// <summary>Sets the model's states.</summary>
    /// <param name="state">n values.</param>
    void WriteState(ReadOnlySpan<double> state);

    /// <summary>Copies the model's parameters out.</summary>
    /// <param name="parameters">Receives m values.</param>
    void ReadParameters(Span<double> parameters);

    /// <summary>Sets the model's parameters.</summary>
    /// <param name="parameters">m values.</param>
    void WriteParameters(ReadOnlySpan<double> parameters);

    /// <summary>Copies the model's modes out.</summary>
    /// <param name="modes">Receives their values.</param>
    void ReadModes(Span<double> modes)
    {
    }

    /// <summary>Copies the constant values of the model's inputs out.</summary>
    /// <param name="inputs">Receives their values.</param>
    void ReadInputs(Span<double> inputs)
    {
    }

    /// <summary>Makes an independent copy of the model.</summary>
    /// <returns>A model of the same class with the same states and parameters.</returns>
    TModel Copy();
}
