using System;
using System.Collections.Generic;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>What the printed numbers are: plain doubles for the hot path of every integrator, or any kind that fulfils IScalar.</summary>
internal abstract class NumberKind
{
    public static NumberKind Double { get; } = new DoubleKind();

    public static NumberKind Scalar { get; } = new ScalarKind();

    /// <summary>The type of a number.</summary>
    public abstract string Type { get; }

    /// <summary>The type parameters of a printed method, and the constraint behind its arguments.</summary>
    public abstract string TypeParameters { get; }

    public abstract string Constraint { get; }

    /// <summary>Operations up to which arguments are read into locals; beyond, registers run out and locals only cost.</summary>
    public abstract int SmallOperationCount { get; }

    /// <summary>The size at which methods are cut.</summary>
    public abstract MethodBudget Budget { get; }

    /// <summary>Values handed on between methods at most: they lie on a thread's stack, which may be as small as 1 MB.</summary>
    public abstract int LargestScratch { get; }

    /// <summary>The type of the numbers of an input: the regime is the same for all lanes, the whole interval, the whole series.</summary>
    public string TypeOf(string input) => input == "regime" ? "double" : Type;

    public abstract ExpressionPrinter Printer(
        ExpressionGraph graph, IReadOnlyDictionary<int, string> names, Func<Node, string> leaf, IReadOnlyList<string> tables, IEnumerable<int> loaded);

    /// <summary>Reads a place of the scratch vector.</summary>
    public abstract string Load(string access, bool isCondition);

    /// <summary>Limits measured in the findings on emission style: the JIT's own are about twice these.</summary>
    private sealed class DoubleKind : NumberKind
    {
        public override string Type => "double";

        public override string TypeParameters => "";

        public override string Constraint => "";

        public override int SmallOperationCount => 100;

        public override MethodBudget Budget { get; } = new(1000, 28_000, 500);

        public override int LargestScratch => 16 * 1024; // 128 kB

        public override ExpressionPrinter Printer(
            ExpressionGraph graph, IReadOnlyDictionary<int, string> names, Func<Node, string> leaf, IReadOnlyList<string> tables, IEnumerable<int> loaded) =>
            new(graph, names, leaf, tables);

        public override string Load(string access, bool isCondition) => isCondition ? $"({access} != 0d)" : access;
    }

    /// <summary>
    /// Operators of a struct are calls that have to be inlined, and the JIT stops inlining behind a budget: beyond 75 to 100 operations a
    /// method is up to ten times slower.
    /// </summary>
    private sealed class ScalarKind : NumberKind
    {
        public override string Type => "TScalar";

        public override string TypeParameters => "<TScalar>";

        public override string Constraint => " where TScalar : unmanaged, global::OdeDsl.Scalars.IScalar<TScalar>";

        public override int SmallOperationCount => 75;

        public override MethodBudget Budget { get; } = new(60, 28_000, 500);

        public override int LargestScratch => 2 * 1024; // 256 kB of series of order eight

        public override ExpressionPrinter Printer(
            ExpressionGraph graph, IReadOnlyDictionary<int, string> names, Func<Node, string> leaf, IReadOnlyList<string> tables, IEnumerable<int> loaded) =>
            new ScalarPrinter(graph, names, leaf, tables, loaded);

        public override string Load(string access, bool isCondition) => access;
    }
}

/// <summary>What a method may hold before it is cut.</summary>
internal readonly record struct MethodBudget(int Operations, int Bytes, int Locals);
