using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Diagnostics;

/// <summary>What cannot be part of an equation: one problem, at the smallest node.</summary>
public sealed class BodyProblemTests
{
    [Theory]
    [InlineData("double s = 0; [|foreach|] (double v in new[] { 1.0 }) s += v; return s;")]
    [InlineData("double s = X; [|while|] (s > 1) s /= 2; return s;")]
    [InlineData("double s = X; [|do|] s /= 2; while (s > 1); return s;")]
    [InlineData("if (X < 0) [|throw new ArgumentException();|] return X;")]
    [InlineData("[|try|] { return X; } finally { }")]
    [InlineData("[|lock|] (this) return X;")]
    [InlineData("[|goto end;|] end: return X;")]
    [InlineData("[|Math.Sin(X)|]; return X;")]
    [InlineData("[|Helper()|]; return X; } void Helper() {")]
    [InlineData("switch (X) { case > 0: [|goto default;|] default: return 1; }")]
    [InlineData("[|using|] (null) return X;")]
    [InlineData("[|using IDisposable d = null!;|] return X;")]
    [InlineData("[|fixed|] (char* c = \"a\") return X; } unsafe double Other() { return 1;")]
    [InlineData("[|yield return X;|] } double Other() { return 1;")]
    public void A_statement_that_is_not_supported(string statements) => Marked.ExpectOne("ODE0060", Marked.Body(statements));

    [Theory]
    [InlineData("double s = 0; [|for|] (int i = 3; i > 0; i--) s += X; return s;")]
    [InlineData("double s = 0; [|for|] (double d = 0; d < 3; d++) s += X; return s;")]
    [InlineData("double s = 0; [|for|] (int i = 0; i < 3; i += 2) s += X; return s;")]
    [InlineData("double s = 0; [|for|] (int i = 0; i < 3; i++) { s += X; i++; } return s;")]
    [InlineData("double s = 0; [|for|] (int i = 0; i < (X > 0 ? 3 : 4); i++) s += X; return s;")]
    [InlineData("[|for|] (int i = 0; i < 3; i++) { if (X > i) return 1; } return 2;")]
    [InlineData("double s = 0; [|for|] (; ; ) s += X;")]
    [InlineData("double s = 0; [|for|] (int i = 0; i < 100000; i++) s += X; return s;")]
    public void A_loop_that_is_not_supported(string statements) => Marked.ExpectOne("ODE0157", Marked.Body(statements));

    [Theory]
    [InlineData("[|new double[] { 1, 2 }[0]|]")]
    [InlineData("([|(1.0, X)|]).Item2")]
    [InlineData("[|new Func<double>(() => X)()|]")]
    [InlineData("[|new System.Text.StringBuilder()|].Length")]
    [InlineData("[|new System.Text.StringBuilder { Capacity = 3 }|].Length")]
    [InlineData("[|(double?)X ?? 0|]")]
    [InlineData("X > 0 ? X : [|throw new Exception()|]")]
    [InlineData("[|$\"{X}\"|].Length")]
    [InlineData("[|(object)X|] is double d ? d : 0")]
    [InlineData("[|X is double|] ? 1 : 0")]
    [InlineData("[|new int[3]|].Length")]
    [InlineData("[|X.Cube|] + 1; } static class E { extension(double x) { public double Cube => x * x * x; }")]
    [InlineData("[|X.Cube()|] + 1; } static class E { extension(double x) { public double Cube() => x * x * x; }")]
    [InlineData("[|this[0]|]; double this[int i] => i")]
    [InlineData("[|Swap(X)|]; ref double Swap(double x) => throw null!")]
    [InlineData("[|default(DateTime)|].Year")]
    [InlineData("[|typeof(double)|].Equals(null) ? 1 : 0")]
    [InlineData("Twice<double>([|default(double?)|]); double Twice<T>(double? t) => 1")]
    [InlineData("Call([|Square|]); double Call(Func<double, double> f) => 1; double Square(double x) => x * x")]
    [InlineData("Call([|x => x|]); double Call(Func<double, double> f) => 1")]
    [InlineData("[|Sum(X)|]; double Sum(params double[] x) => x.Length")]
    [InlineData("Math.Max([|stackalloc double[1]|].Length, X)")]
    [InlineData("(double)[|(dynamic)X|]")]
    public void An_expression_that_is_not_supported(string expression) => Marked.ExpectOne("ODE0061", Marked.Equation(expression));

    [Theory]
    [InlineData("var a = [|new double[2]|]; return a[0] + a.Length + a[1];")]
    [InlineData("[|var (a, b) = (X, Y)|]; return a + b;")]
    [InlineData("if ([|(object)X|] is double d) return d; return 1;")]
    [InlineData("var a = [|new { V = 1.0 }|]; return a.V * 2;")]
    [InlineData("ref double [|r = ref x|]; return r; } static double x; double Other() { return 1;")]
    [InlineData("Func<double, double> f = [|v => v * v|]; return f(X) + f(Y);")]
    [InlineData("double? n = [|X|]; return n ?? 0;")]
    public void A_local_of_a_kind_that_is_not_supported_is_told_once(string statements) => Marked.ExpectOne("ODE0061", Marked.Body(statements));

    [Theory]
    [InlineData("X is [|{ }|] ? 1 : 0")]
    [InlineData("X switch { [|int|] => 1, _ => 0 }")]
    public void A_pattern_that_is_not_supported(string expression) => Marked.ExpectOne("ODE0062", Marked.Equation(expression));

    [Theory]
    [InlineData("[|System.Numerics.BitOperations.Log2(5)|]")]
    [InlineData("[|System.Threading.Volatile.Read(in Level)|]; readonly static double Level = 1")]
    [InlineData("[|System.Numerics.Vector.IsHardwareAccelerated|] ? 1 : 0")]
    [InlineData("[|DBNull.Value|] == null ? 1 : 0")]
    public void A_member_without_source(string expression) => Marked.ExpectOne("ODE0063", Marked.Equation(expression));

    [Theory]
    [InlineData("[|Math.Round(X, 2)|]")]
    [InlineData("[|Math.Round(X, 2, MidpointRounding.ToEven)|]")]
    [InlineData("[|Math.ReciprocalEstimate(X)|]")]
    [InlineData("[|Math.SinCos(X)|].Sin")]
    [InlineData("[|double.IsNaN(X)|] ? 0 : X")]
    [InlineData("[|Math.ScaleB(X, 3)|]")]
    [InlineData("[|Math.BitIncrement(X)|]")]
    [InlineData("[|double.Hypot(X, Y)|]")]
    [InlineData("[|double.Lerp(X, Y, P)|]")]
    [InlineData("[|Math.BigMul(2, 3)|]")]
    [InlineData("[|double.Parse(null!)|]")]
    [InlineData("[|X.CompareTo(Y)|]")]
    [InlineData("[|X.Equals(Y)|] ? 1 : 0")]
    [InlineData("[|Math.Round(X, X > 0 ? MidpointRounding.ToEven : MidpointRounding.ToZero)|]")]
    public void A_function_that_is_not_supported(string expression) => Marked.ExpectOne("ODE0064", Marked.Equation(expression));

    [Theory]
    [InlineData("[|gain|] * X; double gain = 3")]
    [InlineData("[|Gain|] * X; public double Gain { get; set; }")]
    [InlineData("[|Gain|] * X; public double Gain { get; init; } = 3")]
    [InlineData("[|Total|] * X; public static double Total;")]
    [InlineData("[|Limits.Upper|] * X; } static class Limits { public static double Upper { get; set; }")]
    [InlineData("Gain * X; double Gain { get => [|field|]; set => field = value; }")]
    public void A_variable_that_is_no_state_or_parameter(string expression) => Marked.ExpectOne("ODE0065", Marked.Equation(expression));

    [Theory]
    [InlineData("[|Y|] = 3; return X;")]
    [InlineData("return [|Y|]++;")]
    [InlineData("[|Y|] += X; return X;")]
    [InlineData("[|_count|] = 1; return X; } double _count; double Other() { return 1;")]
    [InlineData("double a = 1; double b = Set(); return a + b; double Set() { [|a|] = X; return a; }")]
    [InlineData("return Change(X); } double Change(in double a) { return X; } double Other() { [|Y|] = 2; return 1; } [Observable] double O => Other(); double More() { return 1;")]
    public void An_assignment_outside_the_equation(string statements) => Marked.ExpectOne("ODE0066", Marked.Body(statements));

    [Theory]
    [InlineData("A; double A => B + 1; double B => [|A|] + 1")]
    [InlineData("[|XRate|] + 1")]
    [InlineData("F(X); double F(double x) => x > 1 ? [|F(x - 1)|] : 1")]
    public void Recursion(string expression) => Marked.ExpectOne("ODE0067", Marked.Equation(expression));

    [Fact]
    public void The_message_on_recursion_names_the_cycle()
    {
        string message = Marked.ExpectOne("ODE0067", Marked.Equation("A; double A => B + 1; double B => [|A|] + 1")).GetMessage(null);
        Assert.Contains("A → B → A", message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("[|_gain|] * X; readonly double _gain = 1; public Model(double g) { _gain = g; }")]
    [InlineData("[|Gain|] * X; double Gain { get; } = 1; public Model(double g) => Gain = g;")]
    [InlineData("[|Gain|] * X; static readonly double Gain; static Model() { Gain = Environment.TickCount; }")]
    [InlineData("[|_gain|] * X; readonly double _gain = 1; public double Gain { init => _gain = value; }")]
    public void A_value_that_a_constructor_sets(string expression) => Marked.ExpectOne("ODE0068", Marked.Equation(expression));

    [Fact]
    public void A_parameter_of_a_primary_constructor() => Marked.ExpectOne("ODE0068", """
        using OdeDsl;
        [OdeModel]
        public sealed partial class Model(double gain)
        {
            [State] public partial double X { get; set; }
            [Rate(nameof(X))] double Rate => [|gain|] * X;
        }
        """);

    [Theory]
    [InlineData("[|(int)X|]")]
    [InlineData("Convert(X); double Convert(double v) => [|(long)v|]")]
    [InlineData("X > [|(byte)P|] ? 1 : 2")]
    public void A_whole_number_that_is_not_known(string expression) => Marked.ExpectOne("ODE0069", Marked.Equation(expression));

    [Fact]
    public void A_whole_number_that_takes_a_number() => Marked.ExpectOne("ODE0069", Marked.Body("int i = 1; [|i += X|]; return i;"));

    [Theory]
    [InlineData("[|(float)X|]")]
    [InlineData("(double)([|(decimal)X|])")]
    [InlineData("[|MathF.Sin(1f)|]")]
    [InlineData("[|Math.Abs(1.5f)|]")]
    [InlineData("F(2f); double F(float f) => [|f * f|]")]
    [InlineData("F(2f); double F(float f) => [|-f|]")]
    [InlineData("F(2m); double F(decimal f) => [|(double)f|]")]
    [InlineData("[|X > 0 ? 1f : 2f|]")]
    public void Arithmetic_that_is_not_double(string expression) => Marked.ExpectOne("ODE0070", Marked.Equation(expression));

    [Theory]
    [InlineData("[|new Metres() + 1.0|]; } struct Metres { public static double operator +(Metres m, double x) => x;")]
    [InlineData("[|-new Metres()|]; } struct Metres { public static double operator -(Metres m) => 1;")]
    [InlineData("[|new Metres()|]; } struct Metres { public static implicit operator double(Metres m) => 1;")]
    [InlineData("[|(double)TimeSpan.Zero.TotalSeconds * new Metres()|]; } struct Metres { public static double operator *(double x, Metres m) => x;")]
    public void A_user_defined_operator(string expression) => Marked.ExpectOne("ODE0071", Marked.Equation(expression));

    [Theory]
    [InlineData("double a = X; return F([|ref a|]); } double F(ref double x) { return x;")]
    [InlineData("return F([|out double a|]); } double F(out double x) { return x = 1;")]
    [InlineData("double a = X; return F([|in a|]); double F(in double x) => x;")]
    public void An_argument_by_reference(string statements) => Marked.ExpectOne("ODE0072", Marked.Body(statements));

    [Theory]
    [InlineData("[|DateTime.Now|].Hour")]
    [InlineData("[|Random.Shared.NextDouble()|]")]
    [InlineData("[|Environment.TickCount|]")]
    [InlineData("[|System.Diagnostics.Stopwatch.GetTimestamp()|]")]
    [InlineData("[|new Random().NextDouble()|]")]
    public void A_value_that_changes_from_call_to_call(string expression) => Marked.ExpectOne("ODE0073", Marked.Equation(expression));

    [Theory]
    [InlineData("X + [|Missing|]")]
    [InlineData("[|Missing|](X) + 1")]
    [InlineData("[|X.Missing|]")]
    [InlineData("Math.Sin([|Missing|])")]
    [InlineData("[|Math.Sin(X, Y)|]")]
    [InlineData("[|Made|] * X; private partial double Made { get; }")]
    [InlineData("X > 0 ? [|Missing|] : Y")]
    [InlineData("X switch { > 0 => [|Missing|], _ => Y }")]
    public void A_name_that_is_not_resolved(string expression) => Marked.ExpectOne("ODE0074", Marked.Equation(expression));

    [Fact]
    public void A_body_that_does_not_return() =>
        Marked.ExpectOne("ODE0074", Marked.Model("[|[Rate(nameof(X))] double XRate(double time) { if (time > 0) return 1; }|]"));

    [Theory]
    [InlineData("(X > 0 ? 1 : 0) is var a && [|1 / a|] > 0 ? 1 : 2")]
    [InlineData("F(0); double F(int i) => [|1 / i|]")]
    [InlineData("F(int.MaxValue); double F(int i) => checked([|i + 1|])")]
    [InlineData("F(int.MinValue); double F(int i) => [|Math.Abs(i)|]")]
    [InlineData("F(300); double F(int i) => checked([|(byte)i|])")]
    public void Integer_arithmetic_that_fails(string expression) => Marked.ExpectOne("ODE0076", Marked.Equation(expression));

    [Theory]
    [InlineData("[|_other.X|]; readonly Model _other = null!")]
    [InlineData("F(null!); double F(Model m) => [|m.X|]")]
    [InlineData("[|Text.Length|]; string Text => \"a\"")]
    [InlineData("[|Other.Level()|]; Tank Other => null!; } public class Tank { public double Level() => 1;")]
    public void A_number_of_another_object(string expression) => Marked.ExpectOne("ODE0077", Marked.Equation(expression));

    [Fact]
    public void A_call_through_an_interface() => Marked.ExpectOne("ODE0061", Marked
        .Equation("([|(IModel)this|]).Level; public double Level => 1; } interface IModel { double Level { get; }")
        .Replace("class Model", "class Model : IModel", StringComparison.Ordinal));

    [Theory]
    [InlineData("A * X; static readonly double A = [|B|] + 1; static readonly double B = 2")]
    [InlineData("A * X; static readonly double A = F(); static double F() => [|B|]; static readonly double B = 2")]
    [InlineData("A * X; static readonly double A = [|A|] + 1")]
    [InlineData("B * A * X; static double A { get; } = [|B|] + 1; static readonly double B = 2")]
    public void A_static_member_read_before_it_is_set(string expression) => Marked.ExpectOne("ODE0078", Marked.Equation(expression));

    [Fact]
    public void A_static_member_of_a_type_that_looks_back() => Marked.ExpectOne(
        "ODE0078",
        Marked.Equation("A * X; static readonly double A = [|Other.B|] + 1"),
        "static class Other { public static readonly double B = 2, C = Model.D; } partial class Model { public static readonly double D = 1; }");

    [Fact]
    public void A_static_member_of_another_part() => Marked.ExpectOne(
        "ODE0078",
        Marked.Equation("A * X; static readonly double A = [|B|] + 1"),
        "partial class Model { static readonly double B = 2; }");

    [Fact]
    public void Too_many_cases()
    {
        string terms = string.Join(" + ", Enumerable.Range(0, 7).Select(static i => $"(X > {i} ? {1 << i} : 0)"));
        Marked.ExpectOne("ODE0079", Marked.Equation($"1.0 * ([|{terms}|])"));
    }

    [Theory]
    [InlineData("X [|switch|] { < 0 => 1, >= 0 => 2 }")]
    [InlineData("X [|switch|] { 1 => 1, 2 => 2 }")]
    [InlineData("(X > 0) [|switch|] { true when Y > 0 => 1.0, false => 2 }")]
    public void A_switch_expression_without_a_value(string expression) => Marked.ExpectOne("ODE0080", Marked.Equation(expression));

    [Theory]
    [InlineData("[|F()|]; public virtual double F() => X")]
    [InlineData("[|F|]; public virtual double F => X")]
    [InlineData("[|ToDouble()|]; } public class Base { public virtual double ToDouble() => 1;")]
    public void A_member_that_can_be_overridden(string expression)
    {
        string declaration = expression.Contains("Base", StringComparison.Ordinal) ? "partial class Model : Base" : "partial class Model";
        string source = Marked.Equation(expression).Replace("sealed partial class Model", declaration, StringComparison.Ordinal);
        Marked.ExpectOne("ODE0049", source);
    }

    [Fact]
    public void An_expression_nested_too_deeply()
    {
        // Deep enough for our reader, not for the compiler's parser, which has limits of its own.
        string helpers = string.Join("\n", Enumerable.Range(0, 6000).Select(static i => $"double H{i} => H{i + 1} + 1;"));
        string source = Marked.Model($"[Rate(nameof(X))] double [|XRate|] => H0;\n{helpers}\ndouble H6000 => X;");
        Exception? failure = null;
        Thread small = new(() => failure = Record.Exception(() => Marked.ExpectOne("ODE0075", source)), maxStackSize: 1 << 20);
        small.Start();
        small.Join();
        Assert.Null(failure);
    }
}
