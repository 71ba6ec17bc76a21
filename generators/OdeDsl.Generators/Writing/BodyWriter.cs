using System;
using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>
/// Prints the body that computes a quantity. Small ones read every argument into a local first and write results last, which lets
/// the JIT keep all in registers; larger ones read and write in place; very large ones are cut into methods, because the JIT stops
/// optimising a method silently when it grows too big.
/// </summary>
internal sealed class BodyWriter(SourceWriter writer, ModelNames names, IReadOnlyDictionary<string, int> lengths, CancellationToken cancellationToken)
{
    /// <summary>Arguments and results up to which each has a local of its own; well below the JIT's limit of 512.</summary>
    private const int SmallLocalCount = 400;

    /// <summary>Places up to which zeros are written one by one.</summary>
    private const int SmallLength = 64;

    /// <summary>Decides how a quantity is computed.</summary>
    public BodyPlan Plan(Quantity quantity)
    {
        Schedule schedule = Schedule.Of(quantity.Graph, [.. quantity.Results.Select(static result => result.Node)], cancellationToken);
        bool isSmall = schedule.OperationCount <= quantity.Kind.SmallOperationCount
            && schedule.Reached.Count + quantity.Results.Count <= SmallLocalCount;
        return new BodyPlan(quantity, schedule, isSmall ? [] : MethodCutter.Cut(schedule, quantity.Kind.Budget));
    }

    /// <summary>Prints the member, and after it whatever methods it calls.</summary>
    public void Write(BodyPlan plan)
    {
        (Quantity quantity, Schedule schedule, IReadOnlyList<MethodPart> parts) = (plan.Quantity, plan.Schedule, plan.Parts);
        writer.Open("public static void " + Signatures.Head(quantity.Method, quantity));
        if (parts.Count == 0) WriteSmall(quantity, schedule);
        else if (parts.Count == 1) WriteInPlace(quantity, parts[0], isWhole: true);
        else WriteCalls(plan);
        writer.Close();
        if (parts.Count <= 1) return;
        for (int i = 0; i < parts.Count; i++)
        {
            writer.Line();
            string name = quantity.PartName + Literals.Integer(i + 1);
            writer.Open("private static void " + Signatures.Head(name, quantity, parts[i].ScratchLength > 0));
            WriteInPlace(quantity, parts[i], isWhole: false);
            writer.Close();
        }
    }

    private void WriteSmall(Quantity quantity, Schedule schedule)
    {
        Node[] leaves = [.. schedule.Reached.Select(index => quantity.Graph[index]).Where(static node => node.IsLeaf)];
        WriteSlices(quantity, leaves);
        foreach (Node leaf in leaves)
        {
            if (names.LocalOf(leaf) is { } local) writer.Line($"{quantity.Kind.Type} {local} = {ModelNames.Access(leaf)};");
        }

        NameScope scope = names.NewScope();
        Dictionary<int, string> known = [];
        ExpressionPrinter printer = quantity.Kind.Printer(quantity.Graph, known, leaf => names.LocalOf(leaf) ?? ModelNames.Access(leaf), names.Tables, []);
        Dictionary<int, string> values = [];
        CommentCursor comments = new(writer, quantity.Results);
        foreach (Step step in schedule.Steps)
        {
            comments.Before(step);
            if (step.Output < 0)
            {
                string definition = printer.PrintDefinition(step.Node);
                known[step.Node] = Identifiers.Escape(scope.Claim("v" + Literals.Integer(known.Count + 1)));
                writer.Line($"{printer.TypeOf(step.Node)} {known[step.Node]} = {definition};");
            }
            else
            {
                Result result = quantity.Results[step.Output];
                string value = printer.PrintResult(step.Node);
                if (!quantity.Graph[step.Node].IsLeaf && !schedule.IsShared(step.Node))
                {
                    string local = Identifiers.Escape(scope.Claim(result.Name));
                    writer.Line($"{quantity.Kind.Type} {local} = {value};");
                    value = local;
                }

                values[result.Place] = value;
            }
        }

        WriteResults(quantity, values);
    }

    /// <summary>Writes the results last, so that none of the arguments has to be read again behind a write.</summary>
    private void WriteResults(Quantity quantity, Dictionary<int, string> values)
    {
        if (quantity.Length > SmallLength && values.Count < quantity.Length) writer.Line($"{quantity.Target}.Clear();");
        for (int place = 0; place < quantity.Length; place++)
        {
            if (values.TryGetValue(place, out string? value)) writer.Line($"{quantity.Target}[{Literals.Integer(place)}] = {value};");
            else if (quantity.Length <= SmallLength) writer.Line($"{quantity.Target}[{Literals.Integer(place)}] = 0d;");
        }
    }

    private void WriteInPlace(Quantity quantity, MethodPart part, bool isWhole)
    {
        WriteSlices(quantity, [.. part.Leaves.Select(index => quantity.Graph[index])]);
        if (part.ScratchLength > 0) writer.Line($"scratch = scratch[..{Literals.Integer(part.ScratchLength)}];");
        if (isWhole && quantity.Results.Count < quantity.Length) writer.Line($"{quantity.Target}.Clear();");
        NameScope scope = ModelNames.NewScopeOfArguments();
        Dictionary<int, string> known = [];
        foreach (KeyValuePair<int, int> slot in part.Loads)
        {
            known[slot.Key] = quantity.Kind.Load($"scratch[{Literals.Integer(slot.Value)}]", quantity.Graph.IsCondition(slot.Key));
        }

        ExpressionPrinter printer = quantity.Kind.Printer(quantity.Graph, known, ModelNames.Access, names.Tables, part.Loads.Keys);
        CommentCursor comments = new(writer, quantity.Results);
        int count = 0;
        foreach (Step step in part.Steps)
        {
            cancellationToken.ThrowIfCancellationRequested();
            comments.Before(step);
            if (step.Output >= 0)
            {
                string place = Literals.Integer(quantity.Results[step.Output].Place);
                writer.Line($"{quantity.Target}[{place}] = {printer.PrintResult(step.Node)};");
                continue;
            }

            string definition = printer.PrintDefinition(step.Node);
            known[step.Node] = Identifiers.Escape(scope.Claim("v" + Literals.Integer(++count)));
            writer.Line($"{printer.TypeOf(step.Node)} {known[step.Node]} = {definition};");
            if (part.Stores.TryGetValue(step.Node, out int stored))
                writer.Line($"scratch[{Literals.Integer(stored)}] = {printer.PrintResult(step.Node)};");
        }
    }

    private void WriteCalls(BodyPlan plan)
    {
        (Quantity quantity, IReadOnlyList<MethodPart> parts) = (plan.Quantity, plan.Parts);
        writer.Line($"{quantity.Target} = {quantity.Target}[..{Literals.Integer(quantity.Length)}];");
        if (quantity.Results.Count < quantity.Length) writer.Line($"{quantity.Target}.Clear();");
        if (!plan.Fits)
        {
            throw new NotSupportedException(
                $"{Literals.Integer(plan.ScratchLength)} values of {quantity.Method} are needed far from where they are computed, more than the "
                + $"{Literals.Integer(quantity.Kind.LargestScratch)} that fit on the stack; split the model, or write sums over many states as sums "
                + "of partial sums");
        }

        string type = quantity.Kind.Type;
        if (plan.ScratchLength > 0)
            writer.Line($"global::System.Span<{type}> scratch = stackalloc {type}[{Literals.Integer(plan.ScratchLength)}];");
        for (int i = 0; i < parts.Count; i++)
            writer.Line($"{quantity.PartName}{Literals.Integer(i + 1)}({Signatures.Arguments(quantity, parts[i].ScratchLength > 0)});");
    }

    /// <summary>Cuts each vector to its length: the one bounds check that makes all others vanish, and the error for a vector too short.</summary>
    private void WriteSlices(Quantity quantity, IReadOnlyList<Node> leaves)
    {
        HashSet<string> used = [.. leaves.Select(ModelNames.ArgumentOf)];
        foreach (string input in quantity.Inputs.Where(used.Contains)) writer.Line($"{input} = {input}[..{Literals.Integer(lengths[input])}];");
        writer.Line($"{quantity.Target} = {quantity.Target}[..{Literals.Integer(quantity.Length)}];");
    }
}

/// <summary>Prints the comment of each result once, above its first line.</summary>
internal sealed class CommentCursor(SourceWriter writer, IReadOnlyList<Result> results)
{
    private int _next;
    private bool _isDue = true;

    public void Before(Step step)
    {
        if (_isDue && _next < results.Count && results[_next].Comment.Length > 0) writer.Line("// " + Literals.Comment(results[_next].Comment));
        _isDue = step.Output >= 0;
        if (step.Output >= 0) _next = step.Output + 1;
    }
}

/// <summary>How a quantity is computed.</summary>
/// <param name="Quantity">The quantity.</param>
/// <param name="Schedule">The order of its computation.</param>
/// <param name="Parts">The methods it is cut into; none if it is small enough to read every argument into a local.</param>
internal sealed record BodyPlan(Quantity Quantity, Schedule Schedule, IReadOnlyList<MethodPart> Parts)
{
    /// <summary>The values handed on between methods.</summary>
    public int ScratchLength => Parts.Count > 1 ? Parts[0].ScratchLength : 0;

    /// <summary>Whether these fit on the stack.</summary>
    public bool Fits => ScratchLength <= Quantity.Kind.LargestScratch;
}
