using System.Globalization;
using System.Reflection;
using System.Runtime.Loader;
using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Reading;

/// <summary>
/// Bodies put together at random from all statements: branches that assign, return and break in every order. The expression that
/// is read must equal what the C# compiler makes of the same body, bit for bit.
/// </summary>
public sealed class RandomBodyTests
{
    private const int BodiesPerSeed = 60;
    private static readonly double[] Values = [-2, -1, -0.5, -0.0, 0, 0.5, 1, 2, 3, 1e300];

    private delegate double Body(double time, double x, double y, double p);

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Random_bodies_are_read_as_the_compiler_reads_them(int seed)
    {
        Random random = new(seed);
        BodyMaker maker = new(random);
        (string Text, ModelDefinition Model)[] read = [.. Enumerable.Range(0, BodiesPerSeed).Select(_ => Readable(maker))];
        Body[] compiled = Compile(read.Select(static body => body.Text));
        for (int body = 0; body < read.Length; body++)
        {
            for (int i = 0; i < 200; i++)
            {
                double[] point = [.. Enumerable.Range(0, 4).Select(_ => Values[random.Next(Values.Length)])];
                double expected = compiled[body](point[0], point[1], point[2], point[3]);
                ModelDefinition model = read[body].Model;
                double actual = new GraphEvaluator(model, point[0], [point[1], point[2]], [point[3]]).Value(model.States[0].Rate);
                bool same = BitConverter.DoubleToInt64Bits(expected) == BitConverter.DoubleToInt64Bits(actual)
                    || (double.IsNaN(expected) && double.IsNaN(actual));
                Assert.True(same, $"At ({string.Join("; ", point)}): compiled {expected:R}, read {actual:R}\n{read[body].Text}");
            }
        }
    }

    /// <summary>The next body whose whole numbers stay within the limit of cases; nothing else may be wrong with it.</summary>
    private static (string Text, ModelDefinition Model) Readable(BodyMaker maker)
    {
        while (true)
        {
            string text = maker.Body();
            ModelReading reading = ModelText.Read(Marked.Body(text));
            Assert.DoesNotContain(reading.Problems, static problem => problem.Id != "ODE0079");
            if (reading.Problems.Count == 0) return (text, reading.Model!);
        }
    }

    private static Body[] Compile(IEnumerable<string> bodies)
    {
        string methods = string.Concat(bodies.Select(static (text, i) =>
            string.Create(CultureInfo.InvariantCulture, $"public static double M{i}(double time, double X, double Y, double P) {{ {text} }}\n")));
        using MemoryStream image = new();
        Assert.True(Compiling.Compile("using System; public static class Bodies { " + methods + " }").Emit(image).Success);
        image.Position = 0;
        Type type = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image).GetType("Bodies")!;
        return [.. type.GetMethods(BindingFlags.Static | BindingFlags.Public)
            .OrderBy(static method => int.Parse(method.Name.AsSpan(1), CultureInfo.InvariantCulture))
            .Select(static method => method.CreateDelegate<Body>())];
    }

    private sealed class BodyMaker(Random random)
    {
        private int _wholeChoices;
        private bool _declared;

        /// <summary>A body with the locals a, b (double), n (int), q (bool); each statement may leave early.</summary>
        public string Body()
        {
            _wholeChoices = 0;
            _declared = false;
            string locals = $"double a = {Number(2)}, b = {Number(1)}; int n = 1; bool q = {Condition(1)};";
            _declared = true;
            return $"{locals} {Statements(4, 3, false)} return a + b * n + (q ? 1 : 0);";
        }

        private string Statements(int count, int depth, bool inSwitch) =>
            string.Concat(Enumerable.Range(0, random.Next(1, count + 1)).Select(_ => Statement(depth, inSwitch)));

        private string Statement(int depth, bool inSwitch) => random.Next(depth > 0 ? 12 : 7) switch
        {
            0 => $"a = {Number(2)};",
            1 => $"b {Pick("+=", "-=", "*=", "/=", "=")} {Number(2)};",
            2 => $"q {Pick("=", "&=", "|=", "^=")} {Condition(2)};",
            3 => Whole(),
            4 => $"if ({Condition(1)}) return {Number(2)};",
            5 => inSwitch ? $"if ({Condition(1)}) break;" : $"a = b++ + --a;",
            6 => $"if ({Condition(0)} && (a = {Number(1)}) > 0 || q) b = {Number(1)};",
            7 or 8 => $"if ({Condition(2)}) {{ {Statements(3, depth - 1, inSwitch)} }} else {{ {Statements(3, depth - 1, inSwitch)} }}",
            9 => $"if ({Condition(2)}) {{ {Statements(3, depth - 1, inSwitch)} }}",
            10 => $"switch ({Number(1)}) {{ case < 0: {Section(depth)} break; case 0 or > 2: {Section(depth)} break; {Default(depth)} }}",
            _ => $"switch (n) {{ case 1: {Section(depth)} break; default: {Section(depth)} return {Number(2)}; case 2: b = {Number(1)}; break; }}",
        };

        private string Section(int depth) => Statements(2, depth - 1, true);

        private string Default(int depth) => random.Next(2) == 0 ? "" : $"default: {Section(depth)} break;";

        /// <summary>The values of n double at most four times, well below the limit.</summary>
        private string Whole() => random.Next(3) switch
        {
            0 when _wholeChoices++ < 4 => $"n = {Condition(1)} ? n + {random.Next(3)} : {random.Next(4)};",
            1 => $"n = {Pick("n / 2", "n % 3", "n << 1", "n & 6", "-n", "~n", "n - 3", "(n ^ 5) * 2")};",
            _ => $"a += n {Pick("*", "+", "-")} {Pick("2", "0.5", "Math.Sign(X)", "Math.Abs(n)")};",
        };

        private string Number(int depth) => random.Next(depth > 0 ? 13 : 6) switch
        {
            0 => "X",
            1 => "Y",
            2 => Pick("P", "time"),
            3 => _declared ? Pick("a", "b", "n") : "time",
            4 => Pick("0.5", "1", "-2", "3", "1.0 / 3"),
            5 => "-X",
            6 or 7 => $"({Number(depth - 1)} {Pick("+", "-", "*", "/", "%")} {Number(depth - 1)})",
            8 => $"({Condition(depth - 1)} ? {Number(depth - 1)} : {Number(depth - 1)})",
            9 => $"Math.{Pick("Abs", "Floor", "Cos", "Round")}(1.0 * {Number(depth - 1)})",
            10 => $"Math.{Pick("Min", "Max", "Pow", "Atan2")}(1.0 * {Number(depth - 1)}, {Number(depth - 1)})",
            11 => $"({Number(depth - 1)} switch {{ > 1 => {Number(depth - 1)}, 0 or -1 => {Number(0)}, var v when v < Y => v, _ => {Number(0)} }})",
            _ => $"-({Number(depth - 1)})",
        };

        private string Condition(int depth) => random.Next(depth > 0 ? 8 : 4) switch
        {
            0 or 1 => $"{Pick("X", "Y", "P", "time")} {Pick("<", "<=", ">", ">=", "==", "!=")} {Pick("0", "1", "X", "-0.5")}",
            2 => "X is > -1 and < 2",
            3 => _declared ? Pick("q", "n > 1", "a < b") : Pick("X > Y", "Y is 0 or 2"),
            4 => $"({Condition(depth - 1)} {Pick("&&", "||", "^", "&", "|")} {Condition(depth - 1)})",
            5 => $"!({Condition(depth - 1)})",
            6 => $"({Condition(depth - 1)}) == ({Condition(depth - 1)})",
            _ => $"({Condition(depth - 1)} ? {Condition(depth - 1)} : {Condition(depth - 1)})",
        };

        private string Pick(params string[] choices) => choices[random.Next(choices.Length)];
    }
}
