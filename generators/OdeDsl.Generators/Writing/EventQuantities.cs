using System;
using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>The members of the contract that concern events.</summary>
internal static class EventQuantities
{
    private static readonly string[] Point = ["state", "parameters"];
    private static readonly string[] LockedPoint = ["state", "parameters", "regime"];

    public static IEnumerable<Quantity> Of(ModelDefinition model, ModelEquations equations)
    {
        if (equations.Events is not { } events) yield break;
        int n = model.States.Count, e = model.Events.Count, width = n + model.Modes.Count;
        yield return Vector("EventGuards", LockedPoint, "values", equations.Locked, events.Guards, i => Text(model.Events[i].Guard, model.Events[i].GuardText));
        yield return Matrix("EventGuardJacobian", LockedPoint, equations.Locked, events.GuardJacobian, e);
        yield return Vector("EventGuardTimeDerivative", LockedPoint, "derivative", equations.Locked, events.GuardByTime, static _ => "");
        yield return Vector(
            "EventActions", Point, "values", equations.Free, events.Actions,
            i => i % width == 0 ? Text(model.Events[i / width].Name, model.Events[i / width].Text) : "");
        yield return Matrix("EventActionJacobian", Point, equations.Free, events.ActionJacobian, e * n);
        yield return Vector("EventActionTimeDerivative", Point, "derivative", equations.Free, events.ActionByTime, static _ => "");
    }

    private static Quantity Vector(
        string method, IReadOnlyList<string> inputs, string target, ExpressionGraph graph, IReadOnlyList<int> nodes, Func<int, string> comment) => new(
        method, inputs, target, nodes.Count, graph, [.. nodes.Select((node, i) => new Result(node, i, "result" + Literals.Integer(i), comment(i)))]);

    private static Quantity Matrix(string method, IReadOnlyList<string> inputs, ExpressionGraph graph, SparseMatrix matrix, int rows) => new(
        method, inputs, "jacobian", rows * matrix.Columns, graph, [.. matrix.Entries.Select(entry =>
            new Result(entry.Node, (entry.Row * matrix.Columns) + entry.Column, $"entry{Literals.Integer(entry.Row)}By{Literals.Integer(entry.Column)}", ""))]);

    private static string Text(string name, string text) => $"{name}: {text}";
}
