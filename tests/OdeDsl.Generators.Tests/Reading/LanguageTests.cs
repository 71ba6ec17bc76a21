using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Reading;

/// <summary>
/// Every construct that is accepted: what is generated must equal the user's own member, compiled by the C# compiler, bit for bit.
/// The points hold zeros of both signs, numbers beside the constants of the conditions, huge and tiny numbers and infinities.
/// </summary>
public sealed class LanguageTests
{
    private static readonly double[] Awkward =
    [
        0.0, -0.0, 1.0, -1.0, 0.5, -0.5, 1.5, 2.5, -2.5, 3.0, 1e-310, -1e-310, 1e300, -1e300, 0.1, 1.0 / 3, Math.PI, -7.25, 123456.789,
        double.PositiveInfinity, double.NegativeInfinity,
    ];

    private static void AssertFaithful(string members, bool withNaN = true)
    {
        RunningModel model = RunningModel.Load(Marked.Model("[Rate(nameof(X))] double XRate => Y;\n" + members));
        double[] values = withNaN ? [.. Awkward, double.NaN] : Awkward;
        Random random = new(20260101);
        foreach (double x in values)
        {
            for (int i = 0; i < 8; i++)
            {
                double y = values[random.Next(values.Length)];
                double p = values[random.Next(values.Length)];
                double time = values[random.Next(values.Length)];
                model.AssertFaithful(time, [x, y], [p]);
            }
        }
    }

    [Fact]
    public void Arithmetic_and_constants() => AssertFaithful("""
        const double Half = 1 / 2.0;
        const int Three = 3;
        const float Tenth = 0.1f;
        const decimal Price = 1.1m;
        [Observable] double A => X + Y - P * 2 / X % 3;
        [Observable] double B => -(X - (Y - P)) + +X;
        [Observable] double C => 1 / 2 + X * (1 / 3) + 7 % 4 * Y;
        [Observable] double D => Half * X + Three / 2 * Y + Tenth * P;
        [Observable] double E => (double)Price * X + 'a' + 0x10 + 1e3f;
        [Observable] double F => Math.PI * X + Math.E + Math.Tau + double.Epsilon + double.Pi;
        [Observable] double G => double.MaxValue * X + double.NegativeZero + int.MaxValue + uint.MaxValue + long.MaxValue + ulong.MaxValue;
        [Observable] double H => X * -0.0 + unchecked(int.MaxValue + 1) + checked(2 + 3);
        [Observable] double I => ((X)) * (double)Y * (double)(2 + 3) + default(double) + (1 << 4) + (5 ^ 3) + (~5) + (-7 / 2) + (-7 % 4);
        [Observable] double J => X % Y + this.X * this.Y;
        [Observable] double K => 2147483647 + 1.0 + 3_000_000_000 * X + 0b101;
        [Observable] double L() => X - X + (double)1.1f;
        [Observable] double M(double time) => time * X;
        """);

    [Fact]
    public void Functions() => AssertFaithful("""
        [Observable] double A => Math.Sqrt(X) + Math.Cbrt(Y) + Math.Exp(X) + Math.Log(Y) + Math.Log2(X) + Math.Log10(X);
        [Observable] double B => Math.Log(X, Y) + Math.Pow(X, Y) + Math.Pow(X, 2) + Math.Atan2(X, Y) + Math.CopySign(X, Y);
        [Observable] double C => Math.Sin(X) + Math.Cos(Y) + Math.Tan(X) + Math.Asin(X) + Math.Acos(Y) + Math.Atan(X);
        [Observable] double D => Math.Sinh(X) + Math.Cosh(Y) + Math.Tanh(X) + Math.Asinh(X) + Math.Acosh(Y) + Math.Atanh(X);
        [Observable] double E => Math.FusedMultiplyAdd(X, Y, P) + Math.IEEERemainder(X, Y);
        [Observable] double F => Math.Abs(X) + Math.Min(X, Y) - Math.Max(Y, P);
        [Observable] double G => Math.MinMagnitude(X, Y) - Math.MaxMagnitude(Y, P);
        [Observable] double H => Math.Floor(X) + Math.Ceiling(Y) * Math.Truncate(X);
        [Observable] double I => Math.Round(X) + Math.Round(Y, MidpointRounding.ToEven) * Math.Round(X, MidpointRounding.AwayFromZero);
        [Observable] double J => Math.Round(X, MidpointRounding.ToZero) + Math.Round(Y, MidpointRounding.ToNegativeInfinity) * Math.Round(P, MidpointRounding.ToPositiveInfinity);
        [Observable] double K => Math.Clamp(X, -1, 2) + Math.Clamp(Y, 0, 0);
        [Observable] double L => double.Sin(X) + double.Abs(Y) + double.Max(X, Y) + double.Exp(X) + double.Log(X, Y) + double.Round(X);
        [Observable] double M => double.Ieee754Remainder(X, Y) + double.Clamp(X, -1, 1) + double.Cbrt(X) + double.FusedMultiplyAdd(X, Y, 1);
        [Observable] double N => double.Min(X, Y) + double.MaxMagnitude(X, Y) + double.MinMagnitude(X, P) + double.CopySign(X, Y) + double.Truncate(X);
        [Observable] double O => Math.Max(1, 2) * X + Math.Abs(-3) + Math.Min(5u, 4u) + Math.Sign(-4) + Math.Max(Math.Abs(-2), 1);
        [Observable] double Q => double.Round(X, MidpointRounding.AwayFromZero) + Math.Round(2.5) + Math.Abs(-2.5);
        """);

    [Fact]
    public void Signs() => AssertFaithful(withNaN: false, members: """
        [Observable] double A => Math.Sign(X) * Y;
        [Observable] double B => Math.Sign(X);
        [Observable] double C => -Math.Sign(X) * Y;
        [Observable] double D => 2 * Math.Sign(X) / 3 + Math.Sign(Y) * Math.Sign(X);
        [Observable] double E => Math.Sign(X) == 1 ? Y : Math.Sign(X) < 0 ? -Y : P;
        [Observable] double F => Math.Sign(X) switch { 1 => Y, 0 => P, _ => -1.0 };
        [Observable] double G => Math.Abs(Math.Sign(X)) + Math.Max(Math.Sign(X), Math.Sign(Y));
        [Observable] double H => double.Sign(X) * 0.5;
        [Observable] double I => 1 / (2 + Math.Sign(X)) + 0 * Math.Sign(X) / 1.0;
        """);

    [Fact]
    public void Conditions() => AssertFaithful("""
        [Observable] double A => X > 0 ? X : -X;
        [Observable] double B => X >= 1 && Y < 2 || !(P <= 0) ? 1 : 2;
        [Observable] double C => X > 0 & Y > 0 | P > 1 ^ X < 2 ? Y : P;
        [Observable] double D => (X > 0) == (Y > 0) ? 1.5 : 2.5;
        [Observable] double E => (X > 0) != (Y > 0) ? 1.5 : 2.5;
        [Observable] double F => X == 1 ? 3 : X != 2.5 ? 4 : 5;
        [Observable] double G => true ? X : 1 / 0.0;
        [Observable] double H => X > 0 ? Y > 0 ? 1 : 2 : P > 0 ? 3 : 4;
        [Observable] double I { get { bool up = X > Y; bool down = !up && X < P; return up ? 1 : down ? -1 : 0; } }
        [Observable] double J => X < Y == true ? X : Y;
        [Observable] double K => (X > 0 ? Y > 0 : P > 0) ? 1 : 2;
        [Observable] double L => X is > 0 and < 2 ? 1 : X is 2.5 or -1 ? 2 : X is not >= 0 ? 3 : X is double.NaN ? 4 : 5;
        [Observable] double M => X is 0 ? 1 : 2;
        [Observable] double N => Y is var y && y > 1 ? y : -Y;
        [Observable] double O => X is double x ? x + 1 : 0;
        [Observable] double Q => (X > 0) is true ? 1.25 : 2.25;
        """);

    [Fact]
    public void Switch_expressions() => AssertFaithful("""
        const double Low = 0.5;
        enum Gear { Reverse = -1, Neutral, First, Second }
        Gear Chosen => X < 0 ? Gear.Reverse : X < Low ? Gear.Neutral : X < 2 ? Gear.First : Gear.Second;
        [Observable] double A => X switch { < -1 => -1.5, -1 => 0, > -1 and < 1 => X * X, 1 or 3 => 7, _ => Y };
        [Observable] double B => Chosen switch { Gear.Reverse => -X, Gear.Neutral => 0, Gear.First or Gear.Second when Y > 0 => Y, _ => P };
        [Observable] double C => (X > 0) switch { true => Y, false => P };
        [Observable] double D => X switch { var x when x > Y => x, double.NaN => -3, _ => Y };
        [Observable] double E => (int)Chosen * X + (Chosen == Gear.First ? 2 : 3);
        [Observable] double F => X switch { < 0 => 1, >= 0 => 2, double.NaN => 3 };
        [Observable] double G => (X > 1 ? 2 : 3) switch { 2 => Y, > 2 => P, _ => 0 };
        [Observable] double H => X switch { not (< 0 or > 1) => 1.5, _ => 2.5 };
        [Observable] double I => (Gear)1 switch { Gear.First => X, _ => Y };
        [Observable] double J => X switch { Low => 1, _ => 2 };
        """);

    [Fact]
    public void Statements() => AssertFaithful("""
        [Observable] double A { get { double a = X; a += Y; a *= 2; a -= P; a /= 3; a %= 5; return a; } }
        [Observable] double B() { double a = 1, b = X; if (X > 0) a = Y; else { b = P; a++; } return a * b; }
        [Observable] double C() { if (X > 0) return 1; if (Y > 0) { if (P > 0) return 2; } else return 3; return 4; }
        [Observable] double D() { double s = 0; if (X > 0) { if (Y > 0) return X; s = 2; } s += P; return s; }
        [Observable] double E() { double a; if (X > Y) { a = X; } else if (X < P) { a = Y; } else { a = P; } return a; }
        [Observable] double F() { double a = X, b; b = a = Y; return a + b++ + ++b - a--; }
        [Observable] double G() { { double t = X; { t = t * 2; return t; } } }
        [Observable] double H() { const double k = 2.5; var z = k * X; ; return z; }
        [Observable] double I() { int i = 3; i++; i += 2; i *= 2; --i; byte q = 250; q += 10; return i / 2 * X + q; }
        [Observable] double J() { int n = X > 0 ? 2 : 5; n = n * n - 1; if (Y > 0) n += 3; return n / 4 + n % 3 + (n >> 1) + (n << 2) + (n & 6) + (n | 1) + (n ^ 5) + ~n - -n; }
        [Observable] double K() { double a = 0; if (X > 0 && (a = Y) > 1) a += 10; return a; }
        [Observable] double L() { bool b = X > 0; b &= Y > 0; b |= P > 0; b ^= X > 1; return b ? 1 : 0; }
        [Observable] double M() { if (X > 0) { } else { return Y; } return P; }
        [Observable] double N() { double a = X > 0 ? 1 : 2; if (a == 1) return 7; return a; }
        [Observable] double O() { _ = X; double a = X; double b = a; a = 5; return b + a; }
        [Observable] double Q() { unchecked { int i = X > 0 ? int.MaxValue : 1; i++; return i; } }
        [Observable] double R() { uint u = X > 0 ? 0u : 3u; u -= 1; long l = u; short s = (short)l; ulong w = ulong.MaxValue; w /= 3; return u + l + s + 1.0 * w; }
        [Observable] double S() { float f = 0.1f; return f * X; }
        [Observable] double T() { double a = X; if (false) { a = 3; } return a; }
        [Observable] double U(double time) { if (time < 1) return X; time -= 1; return time * Y; }
        [Observable] double V() { char c = 'a'; c++; return c; }
        [Observable] double W() { int i = X > 0 ? 0 : 1; double d = i; return 1 / -d; }
        [Observable] double Z() { int i = X > 0 ? 0 : 1; return 1.0 / (-i); }
        """);

    [Fact]
    public void Switch_statements() => AssertFaithful("""
        [Observable] double A() { switch (X) { case 1: return 2; case > 1 and < 3: return Y; default: return P; } }
        [Observable] double B() { double a = 0; switch (X > 0) { case true: a = 1; break; case false: a = 2; break; } return a; }
        [Observable] double C() { double a = 1; switch (X) { case < 0: if (Y > 0) break; a = 5; break; case 0: case 1: a = 7; break; } return a; }
        [Observable] double D() { double a = 1; switch (X) { default: a = 2; break; case > 2: a = 3; break; case < -2 when Y > 0: return 9; } return a + Y; }
        [Observable] double E() { int m = X > 0 ? 1 : X < -1 ? 2 : 3; switch (m) { case 1: return Y; case 2: return -Y; } return P; }
        [Observable] double F() { double a = 0; switch (X) { case > 0: switch (Y) { case > 0: if (P > 0) break; a = 1; break; default: a = 2; break; } a += 10; break; default: a = 4; break; } return a; }
        [Observable] double G() { double a = 0; switch (X) { case > 0: if (Y > 0) return 1; a = 2; break; } return a + P; }
        [Observable] double H() { switch (X) { case var v when v > Y: return v; case 2.5: default: return 1; } }
        """);

    [Fact]
    public void Members_and_helpers() => AssertFaithful("""
        double Twice => 2 * X;
        double Half(double v) => v / 2;
        double Mix(double a, double b = 3, double c = 4) { double r = a - b; return r * c; }
        static double Square(double v) => v * v;
        static readonly double Root = Math.Sqrt(2), Double = Root * 2;
        static readonly int Count = 7;
        static double Fixed { get; } = 1.25;
        readonly double _own = 3.5;
        double Own { get; } = 4.5;
        readonly bool _on = true;
        static readonly bool Off;
        double In(in double v) => v + 1;
        double Pick<T>(bool c, T a, T b, Func<T, double>? f = null) => c ? X : Y;
        [Observable] double A => Twice + Half(Y) + Mix(X) + Mix(X, c: Y) + Mix(c: X, a: Y, b: P);
        [Observable] double B => Square(X) + Model.Square(Y) + Helpers.Cube(P) + Helpers.Scale * X;
        [Observable] double C => Root * X + Double + Count / 2 * Y + Fixed + _own + Own + (_on ? 1 : 2) + (Off ? 1 : 2);
        [Observable] double D { get { double Local(double v) => v * X + Y; static double Pure(double v) { if (v > 0) return 1; return v; } return Local(P) + Pure(X); } }
        [Observable] double E { get { double k = X; double Captured() => k * 2; double first = Captured(); k = Y; return first - Captured(); } }
        [Observable] double F => In(X) + In(3) + X.Squared() + this.Total() + Helpers.Sum(this);
        [Observable] double G => XRate + YRate;
        [Observable] double H(double time) => Timed(time) - Timed(2);
        double Timed(double t) => t * X;
        [Observable] double I => Pick<double>(X > 0, 1, 2) + A;
        [Observable] double J => Recorded(X > 0 ? 2 : 3);
        double Recorded(int n) => n / 2;
        [Observable] double K => Generic<int>.Value + Helpers.Deep.Level;
        private partial double Halves(double v);
        private partial double Halves(double v) => v / 4;
        private partial double Parted { get; }
        private partial double Parted => X - 1;
        [Observable] double L => Halves(X) + Parted;
        [Observable] public double M { get => X * 3; set => X = value; }
        [Observable] double N => Named("flow", X);
        double Named(string name, double v) => v + 1;
        }
        static class Generic<T> { public static readonly double Value = 2.5; }
        static class Helpers
        {
            public const double Scale = 1e-3;
            public static double Cube(double v) { var s = v * v; return s * v; }
            public static double Squared(this double v) => v * v;
            public static double Total(this Model model) => model.X + model.Y;
            public static double Sum(Model model) { var m = model; return m.X - m.P; }
            public static class Deep { public static double Level => Scale * 2; }
        """);

    [Fact]
    public void Inherited_helpers()
    {
        string model = Marked.Equation("Above(X) + Level + base.Shared() + Shared() + Last").Replace("class Model", "class Model : Middle", StringComparison.Ordinal);
        RunningModel running = RunningModel.Load(
            model.Replace("[Parameter(2)]", "protected override double Shared() => Y * base.Shared(); [Parameter(2)]", StringComparison.Ordinal),
            """
            public abstract class Base
            {
                protected double Above(double v) => v + Level;
                protected double Level => 2.5;
                protected virtual double Shared() => 3;
                protected abstract double Last { get; }
            }
            public class Middle : Base
            {
                protected override double Shared() => Level * base.Shared();
                protected sealed override double Last => 7;
            }
            """);
        running.AssertFaithful(0, [1.5, -2.5], [3]);
    }

    [Fact]
    public void A_value_is_read_when_the_program_would_read_it() => AssertFaithful("""
        [Observable] double A() { double a = X; return a + (a = Y) * a; }
        [Observable] double B() { double a = X; double r = X > 0 ? (a = 1) : (a = 2); return r * 10 + a; }
        [Observable] double C() { double a = X; double r = Sub(a, a = Y, a); return r; }
        double Sub(double a, double b, double c) => a - b * c;
        [Observable] double D() { double a = X; if (X > 0 || (a = Y) > 0) a += 1; return a; }
        """);

    [Fact]
    public void A_sum_of_thousands_of_terms_is_read()
    {
        string sum = string.Join(" + ", Enumerable.Range(0, 5_000).Select(static i => i % 2 == 0 ? "X" : $"{i} * Y"));
        var reading = ModelText.Read(Marked.Equation(sum));
        Assert.Empty(reading.Problems);
        Assert.True(reading.Model!.Nodes.Count > 5_000);
    }
}
