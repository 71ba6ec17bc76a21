using CsCheck;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>
/// Random models: a recipe is a list of instructions, each of which applies an operation to numbers or conditions made before it.
/// Functions mostly get arguments inside their domain, so that most values are finite; the rest must still agree bit for bit.
/// </summary>
internal static class RandomModels
{
    public const int StateCount = 3;
    public const int ParameterCount = 3;
    public const int InputCount = 1;

    /// <summary>Parameters, a mode, an input and its slope.</summary>
    public const int ConstantCount = ParameterCount + 1 + (2 * InputCount);

    private static readonly double[] Exponents = [2, 3, 4, 5, 0.5, 1.5, 2.5, -1, -2, -0.5, 0.3, 1, 0];

    /// <summary>Numbers of ordinary size without pattern: hardly any sum or product of them is 0 or whole.</summary>
    public static readonly Gen<double> Ordinary = Gen.Int[-3000, 3000].Select(static i => (i + 0.3719) / 1017.0);

    private static readonly Gen<Instruction> Instruction = Gen.Select(
        Gen.Int[0, 57], Gen.Int[0, 1000], Gen.Int[0, 1000], Gen.Int[0, 1000], Ordinary, static (op, a, b, c, k) => new Instruction(op, a, b, c, k));

    public static Gen<Instruction[]> Recipe { get; } = Instruction.Array[6, 60];

    public static ModelDefinition Build(string name, Instruction[] recipe)
    {
        ModelBuilder model = new() { Name = name };
        ExpressionGraph g = model.Graph;
        List<int> numbers = [];
        for (int i = 0; i < StateCount; i++) numbers.Add(model.State("X" + i));
        for (int i = 0; i < ParameterCount; i++) numbers.Add(model.Parameter("P" + i));
        numbers.Add(model.Time);
        numbers.Add(g.Leaf(Operator.Mode, ParameterCount));
        numbers.Add(g.Leaf(Operator.Input, ParameterCount + 1));
        List<int> conditions = [g.Binary(Operator.Less, numbers[0], numbers[3]), g.Binary(Operator.Greater, numbers[4], g.Constant(0.5))];
        foreach (Instruction instruction in recipe) Apply(g, instruction, numbers, conditions);
        for (int i = 0; i < StateCount; i++) model.Rate(i, numbers[numbers.Count - 1 - i], "state " + i);
        model.Observable("Watched", numbers[^4]);
        return model.Build() with
        {
            Tables = RandomTables.Definitions(name),
            Modes = new([new ModeDefinition(ModelBuilder.Property("M0"), ModeKind.Number, 0)]),
            Inputs = new([new InputDefinition(ModelBuilder.Property("U0"), "m", 0)]),
        };
    }

    private static void Apply(ExpressionGraph g, Instruction i, List<int> numbers, List<int> conditions)
    {
        int a = Recent(numbers, i.A), b = Recent(numbers, i.B), c = Recent(numbers, i.C);
        if (i.Op is >= 44 and <= 51)
        {
            Operator relation = Offset(Operator.Less, (i.Op - 44) % 4);
            conditions.Add(g.Binary(relation, a, i.C % 3 == 0 ? g.Constant(i.K) : b));
            return;
        }

        if (i.Op is 52 or 53)
        {
            int first = Recent(conditions, i.A), second = Recent(conditions, i.B);
            conditions.Add(i.C % 3 == 0 ? g.Unary(Operator.Not, first) : g.Binary(i.C % 3 == 1 ? Operator.And : Operator.Or, first, second));
            return;
        }

        numbers.Add(Number(g, i, a, b, c, conditions));
    }

    private static int Number(ExpressionGraph g, Instruction i, int a, int b, int c, List<int> conditions)
    {
        int Constant(double value) => g.Constant(value);
        int Square(int x) => g.Binary(Operator.Multiply, x, x);
        int AtLeast(double value, int x) => g.Binary(Operator.Add, Constant(value), Square(x));
        int Small(int x) => g.Binary(Operator.Divide, x, AtLeast(1.25, x));
        return i.Op switch
        {
            0 or 1 or 2 => g.Binary(Operator.Add, a, b),
            3 or 4 => g.Binary(Operator.Subtract, a, b),
            5 or 6 or 7 => g.Binary(Operator.Multiply, a, b),
            8 => g.Binary(Operator.Multiply, Constant(i.K), a),
            9 => g.Binary(Operator.Divide, a, AtLeast(0.7, b)),
            10 => g.Binary(Operator.Divide, a, b),
            11 => g.Unary(Operator.Negate, a),
            12 => g.Unary(Operator.Sqrt, AtLeast(0.3, a)),
            13 => g.Unary(Operator.Cbrt, a),
            14 => g.Unary(Operator.Exp, g.Unary(Operator.Sin, a)),
            15 => g.Unary(Operator.Log, AtLeast(0.2, a)),
            16 => g.Binary(Operator.LogBase, AtLeast(0.4, a), AtLeast(1.5, b)),
            17 => g.Unary(Operator.Log2, AtLeast(0.6, a)),
            18 => g.Unary(Operator.Log10, AtLeast(0.6, a)),
            19 => g.Binary(Operator.Pow, AtLeast(0.1, a), Small(b)),
            20 => g.Binary(Operator.Pow, a, Constant(Exponents[i.B % Exponents.Length])),
            21 => g.Binary(Operator.Pow, AtLeast(0.1, a), g.Leaf(Operator.Parameter, i.B % ParameterCount)),
            22 => g.Unary(Operator.Sin, a),
            23 => g.Unary(Operator.Cos, a),
            24 => g.Unary(Operator.Tan, Small(a)),
            25 => g.Unary(Operator.Asin, Small(a)),
            26 => g.Unary(Operator.Acos, Small(a)),
            27 => g.Unary(Operator.Atan, a),
            28 => g.Binary(Operator.Atan2, a, AtLeast(0.3, b)),
            29 => g.Unary(Operator.Sinh, Small(a)),
            30 => g.Unary(Operator.Cosh, Small(a)),
            31 => g.Unary(Operator.Tanh, a),
            32 => g.Unary(Operator.Asinh, a),
            33 => g.Unary(Operator.Acosh, AtLeast(1.5, a)),
            34 => g.Unary(Operator.Atanh, Small(a)),
            35 => g.Ternary(Operator.FusedMultiplyAdd, a, b, c),
            36 => g.Binary(i.C % 2 == 0 ? Operator.CopySign : Operator.IEEERemainder, a, i.C % 3 == 0 ? b : Constant(i.K)),
            37 => g.Unary(Operator.Abs, a),
            38 => g.Unary(Operator.Sign, a),
            39 => g.Binary(Offset(Operator.Min, i.C % 4), a, b),
            40 => g.Ternary(Operator.Clamp, a, i.C % 4 == 0 ? b : Constant(-1.5), i.C % 5 == 0 ? c : Constant(i.K)),
            41 => g.Unary(Offset(Operator.Floor, i.C % 5), a),
            42 => g.Binary(Operator.Remainder, a, i.C % 3 == 0 ? b : Constant(i.K)),
            43 => Constant(i.K),
            56 or 57 => TableNodes.Value(g, i.C % RandomTables.All.Length, a),
            _ => g.Ternary(Operator.Conditional, Recent(conditions, i.A), b, c),
        };
    }

    private static Operator Offset(Operator first, int offset) => (Operator)((int)first + offset);

    private static int Recent(List<int> made, int choice) => made[made.Count - 1 - choice % Math.Min(made.Count, 14)];
}

/// <summary>One step of a recipe.</summary>
internal readonly record struct Instruction(int Op, int A, int B, int C, double K);
