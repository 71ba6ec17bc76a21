using OdeDsl.Scalars;

namespace OdeDsl.Tests.Scalars;

/// <summary>
/// A value and a first derivative, by the chain rule alone. Duals of duals of duals hold mixed higher derivatives: slow, but nothing in
/// them is shared with the recurrences of series. Only what the tests differentiate is there.
/// </summary>
internal readonly record struct Dual<T>(T Value, T Slope) : IScalar<Dual<T>>
    where T : struct, IScalar<T>
{
    private static Dual<T> Chain(Dual<T> x, T value, T derivative) => new(value, derivative * x.Slope);

    public static Dual<T> Constant(double value) => new(T.Constant(value), T.Constant(0));

    public static Dual<T> operator +(Dual<T> left, Dual<T> right) => new(left.Value + right.Value, left.Slope + right.Slope);

    public static Dual<T> operator +(Dual<T> left, double right) => new(left.Value + right, left.Slope);

    public static Dual<T> operator +(double left, Dual<T> right) => new(left + right.Value, right.Slope);

    public static Dual<T> operator -(Dual<T> left, Dual<T> right) => new(left.Value - right.Value, left.Slope - right.Slope);

    public static Dual<T> operator -(Dual<T> left, double right) => new(left.Value - right, left.Slope);

    public static Dual<T> operator -(double left, Dual<T> right) => new(left - right.Value, -right.Slope);

    public static Dual<T> operator *(Dual<T> left, Dual<T> right) =>
        new(left.Value * right.Value, (left.Slope * right.Value) + (left.Value * right.Slope));

    public static Dual<T> operator *(Dual<T> left, double right) => new(left.Value * right, left.Slope * right);

    public static Dual<T> operator *(double left, Dual<T> right) => new(left * right.Value, left * right.Slope);

    public static Dual<T> operator /(Dual<T> left, Dual<T> right) =>
        new(left.Value / right.Value, ((left.Slope * right.Value) - (left.Value * right.Slope)) / (right.Value * right.Value));

    public static Dual<T> operator /(Dual<T> left, double right) => new(left.Value / right, left.Slope / right);

    public static Dual<T> operator /(double left, Dual<T> right) => Constant(left) / right;

    public static Dual<T> operator %(Dual<T> left, Dual<T> right) => throw new NotSupportedException();

    public static Dual<T> operator -(Dual<T> value) => new(-value.Value, -value.Slope);

    public static Dual<T> Square(Dual<T> x) => x * x;

    public static Dual<T> FusedMultiplyAdd(Dual<T> x, Dual<T> y, Dual<T> z) => (x * y) + z;

    public static Dual<T> Sqrt(Dual<T> x) => Chain(x, T.Sqrt(x.Value), 0.5 / T.Sqrt(x.Value));

    public static Dual<T> Cbrt(Dual<T> x) => Chain(x, T.Cbrt(x.Value), T.Cbrt(x.Value) / (3.0 * x.Value));

    public static Dual<T> Exp(Dual<T> x) => Chain(x, T.Exp(x.Value), T.Exp(x.Value));

    public static Dual<T> Log(Dual<T> x) => Chain(x, T.Log(x.Value), 1.0 / x.Value);

    public static Dual<T> Log(Dual<T> x, Dual<T> newBase) => Log(x) / Log(newBase);

    public static Dual<T> Log2(Dual<T> x) => Chain(x, T.Log2(x.Value), 1.0 / (x.Value * Math.Log(2)));

    public static Dual<T> Log10(Dual<T> x) => Chain(x, T.Log10(x.Value), 1.0 / (x.Value * Math.Log(10)));

    public static Dual<T> Pow(Dual<T> x, Dual<T> y)
    {
        T power = T.Pow(x.Value, y.Value);
        return new(power, power * ((y.Slope * T.Log(x.Value)) + (y.Value * x.Slope / x.Value)));
    }

    public static Dual<T> Sin(Dual<T> x) => Chain(x, T.Sin(x.Value), T.Cos(x.Value));

    public static Dual<T> Cos(Dual<T> x) => Chain(x, T.Cos(x.Value), -T.Sin(x.Value));

    public static Dual<T> Tan(Dual<T> x) => Chain(x, T.Tan(x.Value), 1.0 / (T.Cos(x.Value) * T.Cos(x.Value)));

    public static Dual<T> Asin(Dual<T> x) => Chain(x, T.Asin(x.Value), 1.0 / T.Sqrt(1.0 - (x.Value * x.Value)));

    public static Dual<T> Acos(Dual<T> x) => Chain(x, T.Acos(x.Value), -1.0 / T.Sqrt(1.0 - (x.Value * x.Value)));

    public static Dual<T> Atan(Dual<T> x) => Chain(x, T.Atan(x.Value), 1.0 / (1.0 + (x.Value * x.Value)));

    public static Dual<T> Atan2(Dual<T> y, Dual<T> x) => new(
        T.Atan2(y.Value, x.Value),
        ((x.Value * y.Slope) - (y.Value * x.Slope)) / ((x.Value * x.Value) + (y.Value * y.Value)));

    public static Dual<T> Sinh(Dual<T> x) => Chain(x, T.Sinh(x.Value), T.Cosh(x.Value));

    public static Dual<T> Cosh(Dual<T> x) => Chain(x, T.Cosh(x.Value), T.Sinh(x.Value));

    public static Dual<T> Tanh(Dual<T> x) => Chain(x, T.Tanh(x.Value), 1.0 / (T.Cosh(x.Value) * T.Cosh(x.Value)));

    public static Dual<T> Asinh(Dual<T> x) => Chain(x, T.Asinh(x.Value), 1.0 / T.Sqrt(1.0 + (x.Value * x.Value)));

    public static Dual<T> Acosh(Dual<T> x) => Chain(x, T.Acosh(x.Value), 1.0 / T.Sqrt((x.Value * x.Value) - 1.0));

    public static Dual<T> Atanh(Dual<T> x) => Chain(x, T.Atanh(x.Value), 1.0 / (1.0 - (x.Value * x.Value)));

    public static Dual<T> CopySign(Dual<T> x, Dual<T> y) => throw new NotSupportedException();

    public static Dual<T> IEEERemainder(Dual<T> x, Dual<T> y) => throw new NotSupportedException();

    public static Dual<T> Min(Dual<T> left, Dual<T> right) => Choose(Less(left, right), left, right);

    public static Dual<T> Max(Dual<T> left, Dual<T> right) => Choose(Less(right, left), left, right);

    public static Dual<T> Floor(Dual<T> x) => new(T.Floor(x.Value), T.Constant(0));

    public static Dual<T> Condition(bool holds) => new(T.Condition(holds), T.Constant(0));

    public static Dual<T> Less(Dual<T> left, Dual<T> right) => new(T.Less(left.Value, right.Value), T.Constant(0));

    public static Dual<T> LessOrEqual(Dual<T> left, Dual<T> right) => new(T.LessOrEqual(left.Value, right.Value), T.Constant(0));

    public static Dual<T> Equal(Dual<T> left, Dual<T> right) => new(T.Equal(left.Value, right.Value), T.Constant(0));

    public static Dual<T> Choose(Dual<T> condition, Dual<T> whenTrue, Dual<T> whenFalse) => new(
        T.Choose(condition.Value, whenTrue.Value, whenFalse.Value), T.Choose(condition.Value, whenTrue.Slope, whenFalse.Slope));
}
