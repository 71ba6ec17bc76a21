using OdeDsl.LinearAlgebra;
using OdeDsl.Scalars;

namespace OdeDsl.Modeling;

/// <summary>
/// The contract that generated equations fulfil, over flat vectors: state[n], parameters[m], regime[s], with n, m, s the counts
/// in <see cref="Description"/>. Behind the parameters, in the same vector, stand the modes, the inputs and the inputs' slopes
/// (<see cref="ModelDescription.ConstantCount"/> numbers in all): constants as well within one smooth piece of a run.
/// </summary>
/// <remarks>
/// No member allocates, reads anything but its arguments, or throws except <see cref="ArgumentOutOfRangeException"/> for a vector
/// that is too short (and what a called function of System.Math throws, such as Clamp with crossed bounds). Results must not
/// overlap inputs. All members are safe to call from several threads at once.
/// Except for the member that computes rates as written, everything is evaluated with the regime locked: each condition takes
/// the side its regime entry names (see <see cref="SwitchDescription.SideOf(double)"/>), whatever its switching function says at the point.
/// A formula thus stays smooth on both sides of its surface.
/// </remarks>
public interface IOdeSystem
{
    /// <summary>Names, units, bounds, defaults and structure.</summary>
    /// <remarks>For a model with vectors, the description of its default lengths; see <see cref="DescriptionFor"/>.</remarks>
    static abstract ModelDescription Description { get; }

    /// <summary>The description that goes with given parameters, for models with vectors: their lengths decide how many states there are.</summary>
    /// <param name="parameters">The parameters, m values.</param>
    /// <returns>The description; <see langword="null"/> for models without vectors: it is <see cref="Description"/> for all parameters.</returns>
    /// <exception cref="ArgumentException">A length is not a whole number, or too small for the equations.</exception>
    static virtual ModelDescription? DescriptionFor(ReadOnlySpan<double> parameters) => null;

    /// <summary>The rates as written by the user, equal to the model's own members bit for bit.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="rates">Receives the n time derivatives.</param>
    static abstract void Rates(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> rates);

    /// <summary>The rates within a locked regime.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="rates">Receives the n time derivatives.</param>
    static abstract void Rates(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> rates);

    /// <summary>The derivatives of the rates by the states, dense.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="jacobian">Receives n × n values by rows: entry (i, j) at i n + j is ∂rate i / ∂state j. Zeros are written too.</param>
    static abstract void StateJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <summary>The derivatives of the rates by the states, only the entries of <see cref="ModelDescription.StateSparsity"/>, in its order.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="values">Receives the values of the entries.</param>
    static abstract void StateJacobianValues(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values);

    /// <summary>The derivatives of the rates by the parameters, dense.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="jacobian">Receives n × m values by rows. Zeros are written too.</param>
    static abstract void ParameterJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <summary>
    /// The derivatives of the rates by the parameters, only the entries of <see cref="ModelDescription.ParameterSparsity"/>, in its order.
    /// </summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="values">Receives the values of the entries.</param>
    static abstract void ParameterJacobianValues(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values);

    /// <summary>The explicit derivatives of the rates by time.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="derivative">Receives n values.</param>
    static abstract void TimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> derivative);

    /// <summary>The product of the state Jacobian with a direction.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="direction">The direction, n values.</param>
    /// <param name="product">Receives n values.</param>
    static abstract void JacobianVectorProduct(
        double time,
        ReadOnlySpan<double> state,
        ReadOnlySpan<double> parameters,
        ReadOnlySpan<double> regime,
        ReadOnlySpan<double> direction,
        Span<double> product);

    /// <summary>The observables.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="values">Receives the observables, as the user's own members compute them.</param>
    static abstract void Observables(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> values);

    /// <summary>The values of the switching functions.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">
    /// The regime, s values: conditions inside a switching function are locked too. A switching function only looks at entries
    /// before its own, so the regime of a point is found by evaluating and deciding entry by entry.
    /// </param>
    /// <param name="values">Receives s values.</param>
    static abstract void SwitchingFunctions(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values);

    /// <summary>The derivatives of the switching functions by the states, dense.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="jacobian">Receives s × n values by rows. Zeros are written too.</param>
    static abstract void SwitchingJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian);

    /// <summary>The explicit derivatives of the switching functions by time.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="derivative">Receives s values.</param>
    static abstract void SwitchingTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> derivative);

    /// <summary>The regime of a point: for each switching function the side that holds there, as the user's conditions decide it.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">Receives s values.</param>
    static abstract void Regime(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> regime);

    /// <summary>
    /// Whether the equations also run on other kinds of numbers, by the members whose names end in <c>Over</c>. Generated equations do,
    /// save very large ones whose intermediate values would not fit on the stack.
    /// </summary>
    static virtual bool HasGenericForms => false;

    /// <summary>
    /// The rates as written by the user, on any kind of number. At <see cref="ScalarDouble"/> equal to the rates on doubles bit for bit,
    /// except that nothing throws.
    /// </summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="rates">Receives the n time derivatives.</param>
    /// <exception cref="NotSupportedException"><see cref="HasGenericForms"/> is <see langword="false"/>.</exception>
    static virtual void RatesOver<TScalar>(
        TScalar time, ReadOnlySpan<TScalar> state, ReadOnlySpan<TScalar> parameters, Span<TScalar> rates)
        where TScalar : unmanaged, IScalar<TScalar> => throw GenericForms.Missing(nameof(RatesOver));

    /// <summary>
    /// The rates within a locked regime, on any kind of number. At <see cref="ScalarDouble"/> equal to the rates on doubles bit for bit.
    /// </summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values: one for all lanes, for the whole interval, for the whole series.</param>
    /// <param name="rates">Receives the n time derivatives.</param>
    /// <exception cref="NotSupportedException"><see cref="HasGenericForms"/> is <see langword="false"/>.</exception>
    static virtual void RatesOver<TScalar>(
        TScalar time, ReadOnlySpan<TScalar> state, ReadOnlySpan<TScalar> parameters, ReadOnlySpan<double> regime, Span<TScalar> rates)
        where TScalar : unmanaged, IScalar<TScalar> => throw GenericForms.Missing(nameof(RatesOver));

    /// <summary>
    /// The switching functions, on any kind of number. At <see cref="ScalarDouble"/> equal to those on doubles bit for bit.
    /// </summary>
    /// <typeparam name="TScalar">The kind of number.</typeparam>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values; see <see cref="SwitchingFunctions"/>.</param>
    /// <param name="values">Receives s values.</param>
    /// <exception cref="NotSupportedException"><see cref="HasGenericForms"/> is <see langword="false"/>.</exception>
    static virtual void SwitchingFunctionsOver<TScalar>(
        TScalar time, ReadOnlySpan<TScalar> state, ReadOnlySpan<TScalar> parameters, ReadOnlySpan<double> regime, Span<TScalar> values)
        where TScalar : unmanaged, IScalar<TScalar> => throw GenericForms.Missing(nameof(SwitchingFunctionsOver));

    /// <summary>
    /// The layout of the elimination of a I − b J by straight-line code without pivoting; <see langword="null"/> where there is none.
    /// Generated for small sparse Jacobians.
    /// </summary>
    static virtual UnrolledLayout? Unrolled => null;

    /// <summary>
    /// Eliminates in place. The factors are only good where they did not grow much over the matrix.
    /// </summary>
    /// <typeparam name="TElement">Real or complex entries.</typeparam>
    /// <param name="entries">The entries of the matrix by <see cref="Unrolled"/>, zero where they will appear; replaced by the factors.</param>
    /// <param name="growth">
    /// 2 n numbers. The first n must be zero and receive the row sums of |L| |U|; the others those of |U|.
    /// </param>
    /// <exception cref="NotSupportedException"><see cref="Unrolled"/> is <see langword="null"/>.</exception>
    static virtual void Eliminate<TElement>(Span<TElement> entries, Span<double> growth)
        where TElement : struct, IMatrixElement<TElement> =>
        throw new NotSupportedException("These equations have no unrolled elimination; ask Unrolled first.");

    /// <summary>Solves with the factors.</summary>
    /// <typeparam name="TElement">Real or complex entries.</typeparam>
    /// <param name="factors">What <see cref="Eliminate"/> left.</param>
    /// <param name="vector">The right-hand side, n values; replaced by the solution.</param>
    /// <exception cref="NotSupportedException"><see cref="Unrolled"/> is <see langword="null"/>.</exception>
    static virtual void Substitute<TElement>(ReadOnlySpan<TElement> factors, Span<TElement> vector)
        where TElement : struct, IMatrixElement<TElement> =>
        throw new NotSupportedException("These equations have no unrolled elimination; ask Unrolled first.");

    /// <summary>
    /// The guards of the events: numbers as they are, conditions as 1 where they hold and -1 where they do not, in the locked regime.
    /// </summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="values">Receives a value for each of <see cref="ModelDescription.Events"/>.</param>
    static virtual void EventGuards(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> values)
    {
    }

    /// <summary>The derivatives of the events' guards by the states, dense.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="jacobian">Receives n values for each event. Zeros are written too.</param>
    static virtual void EventGuardJacobian(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> jacobian)
    {
    }

    /// <summary>The explicit derivatives of the events' guards by time.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="regime">The regime, s values.</param>
    /// <param name="derivative">Receives a value for each event.</param>
    static virtual void EventGuardTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, ReadOnlySpan<double> regime, Span<double> derivative)
    {
    }

    /// <summary>The states and modes that the actions of all events would set, equal to the user's own methods bit for bit.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="values">Receives for each event the n states, then the modes.</param>
    static virtual void EventActions(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> values)
    {
    }

    /// <summary>The derivatives by the states of the states that the actions set, conditions on the side of the state.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="jacobian">Receives n × n values by rows for each event. Zeros are written too.</param>
    static virtual void EventActionJacobian(double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> jacobian)
    {
    }

    /// <summary>The explicit derivatives by time of the states that the actions set.</summary>
    /// <param name="time">The time.</param>
    /// <param name="state">The state, n values.</param>
    /// <param name="parameters">The parameters, m values.</param>
    /// <param name="derivative">Receives n values for each event.</param>
    static virtual void EventActionTimeDerivative(
        double time, ReadOnlySpan<double> state, ReadOnlySpan<double> parameters, Span<double> derivative)
    {
    }
}
