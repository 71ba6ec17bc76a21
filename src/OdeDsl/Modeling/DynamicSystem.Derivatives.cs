namespace OdeDsl.Modeling;

/// <content>Products with the Jacobian, and derivatives of higher order.</content>
public abstract partial class DynamicSystem
{
    /// <summary>
    /// Whether the rates run on Taylor series, hence have <see cref="SecondDerivative"/>, <see cref="ThirdDerivative"/> and
    /// <see cref="MixedDerivative"/>. Generated models do, save very large ones.
    /// </summary>
    public abstract bool HasHigherDerivatives { get; }

    /// <inheritdoc cref="IOdeSystem.StateJacobianValues"/>
    public abstract void StateJacobianValues(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.ParameterJacobianValues"/>
    public abstract void ParameterJacobianValues(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, Span<double> values);

    /// <inheritdoc cref="IOdeSystem.JacobianVectorProduct"/>
    public abstract void JacobianVectorProduct(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> direction, Span<double> product);

    /// <summary>The product of the transposed state Jacobian with weights: the gradient by the state of the weighted sum of the rates.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="weights">One weight for each rate, n values.</param>
    /// <param name="product">Receives n values.</param>
    public void VectorJacobianProduct(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> weights, Span<double> product)
    {
        SparsityPattern pattern = Description.StateSparsity;
        Span<double> values = pattern.EntryCount <= 1024 ? stackalloc double[pattern.EntryCount] : new double[pattern.EntryCount];
        StateJacobianValues(time, state, regime, values);
        ReadOnlySpan<int> starts = pattern.RowStarts.AsSpan(), columns = pattern.Columns.AsSpan();
        product[..pattern.ColumnCount].Clear();
        for (int row = 0; row < pattern.RowCount; row++)
        {
            for (int entry = starts[row]; entry < starts[row + 1]; entry++) product[columns[entry]] += weights[row] * values[entry];
        }
    }

    /// <summary>
    /// The second derivative of the rates along two directions, B(u, v): component i is the sum of ∂²f(i)/∂x(j)∂x(k) · u(j) v(k).
    /// </summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="u">One direction, n values.</param>
    /// <param name="v">The other direction, n values.</param>
    /// <param name="result">Receives n values.</param>
    /// <remarks>
    /// Taylor series along u + v and u − v, lengths brought to the same size (Yu. A. Kuznetsov, Elements of Applied Bifurcation Theory, section
    /// 5.4). The error is a few units in the last place of the largest second derivative along u or v, times |u| |v|.
    /// </remarks>
    /// <exception cref="NotSupportedException"><see cref="HasHigherDerivatives"/> is <see langword="false"/>.</exception>
    public abstract void SecondDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> u, ReadOnlySpan<double> v, Span<double> result);

    /// <summary>
    /// The third derivative of the rates along three directions, C(u, v, w): component i is the sum of ∂³f(i)/∂x(j)∂x(k)∂x(l) · u(j) v(k) w(l).
    /// </summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="u">One direction, n values.</param>
    /// <param name="v">Another direction, n values.</param>
    /// <param name="w">The last direction, n values.</param>
    /// <param name="result">Receives n values.</param>
    /// <remarks>As <see cref="SecondDerivative"/>, along the four lines u ± v ± w.</remarks>
    /// <exception cref="NotSupportedException"><see cref="HasHigherDerivatives"/> is <see langword="false"/>.</exception>
    public abstract void ThirdDerivative(
        double time,
        ReadOnlySpan<double> state,
        ReadOnlySpan<double> regime,
        ReadOnlySpan<double> u,
        ReadOnlySpan<double> v,
        ReadOnlySpan<double> w,
        Span<double> result);

    /// <summary>
    /// The mixed second derivative of the rates along a direction of states and one of parameters: component i is the sum of
    /// ∂²f(i)/∂x(j)∂p(k) · u(j) q(k).
    /// </summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="u">The direction of states, n values.</param>
    /// <param name="q">The direction of parameters, m values.</param>
    /// <param name="result">Receives n values.</param>
    /// <remarks>As <see cref="SecondDerivative"/>, along (u, q) and (u, −q).</remarks>
    /// <exception cref="NotSupportedException"><see cref="HasHigherDerivatives"/> is <see langword="false"/>.</exception>
    public abstract void MixedDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> regime, ReadOnlySpan<double> u, ReadOnlySpan<double> q, Span<double> result);
}
