using OdeDsl.LinearAlgebra;
using OdeDsl.Modeling;

namespace OdeDsl.Integration;

/// <summary>A model's rates within the regime that <see cref="Motion"/> holds locked, or along the surface it slides on.</summary>
internal readonly struct ModelField<TSystem> : IVectorField
    where TSystem : struct, IOdeSystem
{
    /// <summary>Up to this many states the whole Jacobian of a sliding motion is computed; it fills its pattern.</summary>
    private const int LargestWhole = 1000;

    private readonly double[] parameters;
    private readonly InputSignals? inputs;
    private readonly double[] regime;
    private readonly SlidingSurface sliding;
    private readonly JacobianStructure structure;
    private readonly JacobianStructure slidingStructure;
    private readonly double[] otherSide;

    public ModelField(DynamicSystem system, double[] regime, SlidingSurface sliding)
    {
        parameters = system.Constants;
        inputs = system.Signals;
        this.regime = regime;
        this.sliding = sliding;
        Dimension = system.StateCount;
        DependsOnTime = system.DependsOnTime;
        structure = JacobianStructure.Of(system.Description.StateSparsity);
        bool whole = structure.Pattern is not null && system.SwitchCount > 0 && Dimension <= LargestWhole;
        slidingStructure = whole ? JacobianStructure.Dense(Dimension) : structure;
        otherSide = structure.Pattern is not null && system.SwitchCount > 0 && Dimension > LargestWhole ? new double[structure.EntryCount] : [];
    }

    public int Dimension { get; }

    public int BlockSize => Dimension;

    public JacobianStructure Structure => sliding.IsActive ? slidingStructure : structure;

    public int LargestJacobian => Math.Max(structure.EntryCount, slidingStructure.EntryCount);

    public bool DependsOnTime { get; }

    public void Rates(double time, ReadOnlySpan<double> y, Span<double> rates)
    {
        inputs?.Refresh(time, parameters);
        if (sliding.IsActive) sliding.Rates(time, y, rates);
        else TSystem.Rates(time, y, parameters, regime, rates);
    }

    public void TimeDerivative(double time, ReadOnlySpan<double> y, double scale, Span<double> derivative)
    {
        inputs?.RefreshWithSlopes(time, parameters);
        if (sliding.IsActive) sliding.TimeDerivative(time, y, scale, derivative);
        else TSystem.TimeDerivative(time, y, parameters, regime, derivative);
    }

    public void DirectionalDerivative(double time, ReadOnlySpan<double> y, ReadOnlySpan<double> direction, Span<double> product)
    {
        inputs?.Refresh(time, parameters);
        if (sliding.IsActive) sliding.DirectionalDerivative(time, y, direction, product);
        else TSystem.JacobianVectorProduct(time, y, parameters, regime, direction, product);
    }

    public void Jacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian)
    {
        inputs?.Refresh(time, parameters);
        if (!sliding.IsActive) JacobianHere(time, y, jacobian);
        else if (slidingStructure.Pattern is null) sliding.Jacobian(time, y, jacobian);
        else MixedJacobian(time, y, jacobian);
    }

    private void JacobianHere(double time, ReadOnlySpan<double> y, Span<double> jacobian)
    {
        if (structure.Pattern is null) TSystem.StateJacobian(time, y, parameters, regime, jacobian);
        else TSystem.StateJacobianValues(time, y, parameters, regime, jacobian);
    }

    // The mean of both sides' Jacobians. What is missing, the change of the mixture along the surface, would fill the whole matrix; it is
    // left to the iteration.
    private void MixedJacobian(double time, ReadOnlySpan<double> y, Span<double> jacobian)
    {
        (double below, double above) = sliding.Approaches(time, y);
        double alpha = below / (below - above), entry = regime[sliding.Switch];
        regime[sliding.Switch] = sliding.EntryBelow;
        JacobianHere(time, y, jacobian);
        regime[sliding.Switch] = sliding.EntryAbove;
        JacobianHere(time, y, otherSide);
        regime[sliding.Switch] = entry;
        for (int i = 0; i < otherSide.Length; i++) jacobian[i] += alpha * (otherSide[i] - jacobian[i]);
    }
}
