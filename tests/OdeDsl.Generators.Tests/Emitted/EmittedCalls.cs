using OdeDsl.Modeling;
using OdeDsl.Scalars;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The members of an emitted system, callable without knowing its type; every result vector comes poisoned with NaN.</summary>
internal interface IEmittedCalls
{
    ModelDescription Description { get; }

    double[] Rates(double time, double[] state, double[] parameters);

    double[] Rates(double time, double[] state, double[] parameters, double[] regime);

    double[] StateJacobian(double time, double[] state, double[] parameters, double[] regime);

    double[] StateJacobianValues(double time, double[] state, double[] parameters, double[] regime);

    double[] ParameterJacobian(double time, double[] state, double[] parameters, double[] regime);

    double[] ParameterJacobianValues(double time, double[] state, double[] parameters, double[] regime);

    double[] TimeDerivative(double time, double[] state, double[] parameters, double[] regime);

    double[] JacobianVectorProduct(double time, double[] state, double[] parameters, double[] regime, double[] direction);

    double[] Observables(double time, double[] state, double[] parameters);

    double[] SwitchingFunctions(double time, double[] state, double[] parameters, double[] regime);

    double[] SwitchingJacobian(double time, double[] state, double[] parameters, double[] regime);

    double[] SwitchingTimeDerivative(double time, double[] state, double[] parameters, double[] regime);

    double[] Regime(double time, double[] state, double[] parameters);

    /// <summary>Whether the generic forms are there.</summary>
    bool HasGenericForms { get; }

    T[] RatesOver<T>(T time, T[] state, T[] parameters)
        where T : unmanaged, IScalar<T>;

    T[] RatesOver<T>(T time, T[] state, T[] parameters, double[] regime)
        where T : unmanaged, IScalar<T>;

    T[] SwitchingFunctionsOver<T>(T time, T[] state, T[] parameters, double[] regime)
        where T : unmanaged, IScalar<T>;

    /// <summary>The rates as written, into a vector of the caller's.</summary>
    void RatesInto(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> rates);

    /// <summary>Calls every member once and returns the bytes the calls allocated on this thread.</summary>
    long AllocatedByEveryMember(double time, double[] state, double[] parameters);

    /// <summary>Writes the numbers into a new model, copies it, changes the first, and reads the copy back: states, then parameters.</summary>
    double[] ThroughCopy(double[] state, double[] parameters);
}

/// <inheritdoc/>
internal sealed class EmittedCalls<TModel, TSystem> : IEmittedCalls
    where TModel : class, IOdeModel<TModel, TSystem>, new()
    where TSystem : struct, IOdeSystem
{
    public ModelDescription Description => TSystem.Description;

    private int States => Description.States.Length;

    private int Switches => Description.Switches.Length;

    public double[] Rates(double time, double[] state, double[] parameters)
    {
        double[] result = Poisoned(States);
        TSystem.Rates(time, state, parameters, result);
        return result;
    }

    public double[] Rates(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(States);
        TSystem.Rates(time, state, parameters, regime, result);
        return result;
    }

    public double[] StateJacobian(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(States * States);
        TSystem.StateJacobian(time, state, parameters, regime, result);
        return result;
    }

    public double[] StateJacobianValues(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(Description.StateSparsity.EntryCount);
        TSystem.StateJacobianValues(time, state, parameters, regime, result);
        return result;
    }

    public double[] ParameterJacobian(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(States * Description.Parameters.Length);
        TSystem.ParameterJacobian(time, state, parameters, regime, result);
        return result;
    }

    public double[] ParameterJacobianValues(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(Description.ParameterSparsity.EntryCount);
        TSystem.ParameterJacobianValues(time, state, parameters, regime, result);
        return result;
    }

    public double[] TimeDerivative(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(States);
        TSystem.TimeDerivative(time, state, parameters, regime, result);
        return result;
    }

    public double[] JacobianVectorProduct(double time, double[] state, double[] parameters, double[] regime, double[] direction)
    {
        double[] result = Poisoned(States);
        TSystem.JacobianVectorProduct(time, state, parameters, regime, direction, result);
        return result;
    }

    public double[] Observables(double time, double[] state, double[] parameters)
    {
        double[] result = Poisoned(Description.Observables.Length);
        TSystem.Observables(time, state, parameters, result);
        return result;
    }

    public double[] SwitchingFunctions(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(Switches);
        TSystem.SwitchingFunctions(time, state, parameters, regime, result);
        return result;
    }

    public double[] SwitchingJacobian(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(Switches * States);
        TSystem.SwitchingJacobian(time, state, parameters, regime, result);
        return result;
    }

    public double[] SwitchingTimeDerivative(double time, double[] state, double[] parameters, double[] regime)
    {
        double[] result = Poisoned(Switches);
        TSystem.SwitchingTimeDerivative(time, state, parameters, regime, result);
        return result;
    }

    public double[] Regime(double time, double[] state, double[] parameters)
    {
        double[] result = Poisoned(Switches);
        TSystem.Regime(time, state, parameters, result);
        return result;
    }

    public bool HasGenericForms => TSystem.HasGenericForms;

    public T[] RatesOver<T>(T time, T[] state, T[] parameters)
        where T : unmanaged, IScalar<T>
    {
        T[] result = Poisoned<T>(States);
        TSystem.RatesOver<T>(time, state, parameters, result);
        return result;
    }

    public T[] RatesOver<T>(T time, T[] state, T[] parameters, double[] regime)
        where T : unmanaged, IScalar<T>
    {
        T[] result = Poisoned<T>(States);
        TSystem.RatesOver<T>(time, state, parameters, regime, result);
        return result;
    }

    public T[] SwitchingFunctionsOver<T>(T time, T[] state, T[] parameters, double[] regime)
        where T : unmanaged, IScalar<T>
    {
        T[] result = Poisoned<T>(Switches);
        TSystem.SwitchingFunctionsOver<T>(time, state, parameters, regime, result);
        return result;
    }

    public void RatesInto(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> rates) =>
        TSystem.Rates(time, state, parameters, rates);

    public long AllocatedByEveryMember(double time, double[] state, double[] parameters)
    {
        double[] regime = Regime(time, state, parameters);
        double[] result = new double[Math.Max(States * Math.Max(States, Description.Parameters.Length), Math.Max(Switches * States, 1) + Description.Observables.Length)];
        ScalarDouble[] scalarState = Lift<ScalarDouble>(state), scalarParameters = Lift<ScalarDouble>(parameters), scalarResult = Poisoned<ScalarDouble>(result.Length);
        Jet<Order3>[] jetState = Lift<Jet<Order3>>(state), jetParameters = Lift<Jet<Order3>>(parameters), jetResult = Poisoned<Jet<Order3>>(result.Length);
        CallAll(time, state, parameters, regime, result);
        CallGeneric(ScalarDouble.Constant(time), scalarState, scalarParameters, regime, scalarResult);
        CallGeneric(Jet<Order3>.Constant(time), jetState, jetParameters, regime, jetResult);
        long before = GC.GetAllocatedBytesForCurrentThread();
        CallAll(time, state, parameters, regime, result);
        CallGeneric(ScalarDouble.Constant(time), scalarState, scalarParameters, regime, scalarResult);
        CallGeneric(Jet<Order3>.Constant(time), jetState, jetParameters, regime, jetResult);
        return GC.GetAllocatedBytesForCurrentThread() - before;
    }

    public double[] ThroughCopy(double[] state, double[] parameters)
    {
        TModel model = new();
        model.WriteState(state);
        model.WriteParameters(parameters);
        TModel copy = model.Copy();
        model.WriteState(new double[state.Length]);
        model.WriteParameters(new double[parameters.Length]);
        double[] result = Poisoned(state.Length + parameters.Length);
        copy.ReadState(result);
        copy.ReadParameters(result.AsSpan(state.Length));
        return result;
    }

    private static void CallAll(double time, double[] state, double[] parameters, double[] regime, double[] result)
    {
        TSystem.Rates(time, state, parameters, result);
        TSystem.Rates(time, state, parameters, regime, result);
        TSystem.StateJacobian(time, state, parameters, regime, result);
        TSystem.StateJacobianValues(time, state, parameters, regime, result);
        TSystem.ParameterJacobian(time, state, parameters, regime, result);
        TSystem.ParameterJacobianValues(time, state, parameters, regime, result);
        TSystem.TimeDerivative(time, state, parameters, regime, result);
        TSystem.JacobianVectorProduct(time, state, parameters, regime, state, result);
        TSystem.Observables(time, state, parameters, result);
        TSystem.SwitchingFunctions(time, state, parameters, regime, result);
        TSystem.SwitchingJacobian(time, state, parameters, regime, result);
        TSystem.SwitchingTimeDerivative(time, state, parameters, regime, result);
        TSystem.Regime(time, state, parameters, result);
    }

    private static void CallGeneric<T>(T time, T[] state, T[] parameters, double[] regime, T[] result)
        where T : unmanaged, IScalar<T>
    {
        if (!TSystem.HasGenericForms) return;
        TSystem.RatesOver<T>(time, state, parameters, result);
        TSystem.RatesOver<T>(time, state, parameters, regime, result);
        TSystem.SwitchingFunctionsOver<T>(time, state, parameters, regime, result);
    }

    private static T[] Lift<T>(double[] values)
        where T : unmanaged, IScalar<T> => [.. values.Select(T.Constant)];

    private static T[] Poisoned<T>(int length)
        where T : unmanaged, IScalar<T> => Lift<T>(Poisoned(length));

    private static double[] Poisoned(int length)
    {
        double[] result = new double[length];
        Array.Fill(result, double.NaN);
        return result;
    }
}
