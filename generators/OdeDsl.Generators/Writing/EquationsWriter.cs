using System;
using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Writing;

/// <summary>Prints the nested struct with the model's equations: every member of the contract.</summary>
internal sealed class EquationsWriter(SourceWriter writer, ModelDefinition model, ModelEquations equations, CancellationToken cancellationToken)
{
    private static readonly string[] Point = ["state", "parameters"];
    private static readonly string[] LockedPoint = ["state", "parameters", "regime"];

    /// <summary>Entries up to which the dense state Jacobian is printed on its own, about the size of a method.</summary>
    private const int LargestDenseEntryCount = 400;

    private readonly SwitchTexts _texts = new(model, equations);

    private readonly BodyWriter _body = new(
        writer,
        new ModelNames(model),
        new Dictionary<string, int>
        {
            ["state"] = model.States.Count,
            ["parameters"] = model.Parameters.Count,
            ["regime"] = equations.Switches.Count,
            ["direction"] = model.States.Count,
        },
        cancellationToken);

    public void Write(string name)
    {
        writer.Line("/// <summary>The equations of the model over flat vectors.</summary>");
        writer.Line(GeneratedMark.Code);
        writer.Line(GeneratedMark.NotCovered);
        writer.Open($"public readonly struct {name} : global::OdeDsl.Modeling.IOdeSystem");
        new DescriptionWriter(writer, model, equations, _texts).Write();
        Member(new Quantity("Rates", Point, "rates", model.States.Count, equations.Free, Rates(equations.Rates)));
        if (equations.Switches.Count > 0)
            Member(new Quantity("Rates", LockedPoint, "rates", model.States.Count, equations.Locked, Rates(equations.LockedRates)));
        else
            WriteUnlockedRates();
        WriteStateJacobian();
        Member(Matrix("ParameterJacobian", "jacobian", equations.ParameterJacobian, dense: true));
        Member(Vector("TimeDerivative", LockedPoint, "derivative", equations.TimeDerivative));
        Member(Vector("JacobianVectorProduct", [.. LockedPoint, "direction"], "product", equations.JacobianVectorProduct));
        Member(Observables());
        WriteSwitching();
        writer.Close();
    }

    private void WriteUnlockedRates()
    {
        Quantity locked = new("Rates", LockedPoint, "rates", 0, equations.Locked, []);
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Line("/// <remarks>No condition of this model changes during a run: the regime is empty and not read.</remarks>");
        writer.Line($"public static void Rates({Signatures.Parameters(locked)}) => Rates(time, state, parameters, rates);");
    }

    /// <summary>The dense form of a large Jacobian is spread out from its entries: twice the code would cost more than that pass.</summary>
    private void WriteStateJacobian()
    {
        Quantity dense = Matrix("StateJacobian", "jacobian", equations.StateJacobian, dense: true);
        if (equations.StateJacobian.Entries.Count <= LargestDenseEntryCount)
        {
            Member(dense);
        }
        else
        {
            int length = equations.StateJacobian.Entries.Count;
            writer.Line();
            writer.Line("/// <inheritdoc/>");
            writer.Open($"public static void StateJacobian({Signatures.Parameters(dense)})");
            writer.Line($"StateJacobianValues(time, state, parameters, regime, jacobian[..{Literals.Integer(length)}]);");
            writer.Line("Description.StateSparsity.Expand(jacobian);");
            writer.Close();
        }

        Member(Matrix("StateJacobianValues", "values", equations.StateJacobian, dense: false));
    }

    private void WriteSwitching()
    {
        int count = equations.Switches.Count;
        Member(new Quantity("SwitchingFunctions", LockedPoint, "values", count, equations.Locked, [.. equations.Switches.Select(
            (function, i) => new Result(function.Value, i, "switch" + Literals.Integer(i), TextOf(function)))]));
        Member(Matrix("SwitchingJacobian", "jacobian", equations.SwitchingJacobian, dense: true));
        Member(Vector("SwitchingTimeDerivative", LockedPoint, "derivative", equations.SwitchingTimeDerivative));
        Member(new Quantity("Regime", Point, "regime", count, equations.Free, [.. equations.Switches.Select(
            (function, i) => new Result(function.Decision, i, "side" + Literals.Integer(i), TextOf(function)))]));
    }

    private void Member(Quantity quantity)
    {
        cancellationToken.ThrowIfCancellationRequested();
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        _body.Write(quantity, $"public static void {quantity.Method}({Signatures.Parameters(quantity)})");
    }

    private Result[] Rates(IEnumerable<int> nodes) => [.. nodes.Select(
        (node, i) => new Result(node, i, Local(i) + "Rate", $"{model.States[i].Property.Name}: {model.States[i].RateText}"))];

    private Quantity Observables() => new(
        "Observables", Point, "values", model.Observables.Count, equations.Free, [.. model.Observables.Select((observable, i) =>
            new Result(equations.Observables[i], i, Identifiers.Local(observable.Name) + "Value", $"{observable.Name}: {observable.Text}"))]);

    private Quantity Vector(string method, IReadOnlyList<string> inputs, string target, IReadOnlyList<int> nodes) => new(
        method, inputs, target, nodes.Count, equations.Locked, [.. nodes
            .Select((node, i) => new Result(node, i, RowName(method, i) + (target == "product" ? "Product" : "ByTime"), ""))
            .Where(result => !IsZero(result.Node))]);

    private Quantity Matrix(string method, string target, SparseMatrix matrix, bool dense)
    {
        List<Result> results = [];
        int lastRow = -1;
        foreach (MatrixEntry entry in matrix.Entries)
        {
            string comment = entry.Row != lastRow ? RowText(method, entry.Row) : "";
            lastRow = entry.Row;
            int place = dense ? (entry.Row * matrix.Columns) + entry.Column : results.Count;
            results.Add(new Result(entry.Node, place, EntryName(method, entry), comment));
        }

        int length = dense ? matrix.Rows * matrix.Columns : matrix.Entries.Count;
        return new Quantity(method, LockedPoint, target, length, equations.Locked, results);
    }

    private string EntryName(string method, MatrixEntry entry)
    {
        string column = method == "ParameterJacobian"
            ? model.Parameters[entry.Column].Property.Name
            : model.States[entry.Column].Property.Name;
        return $"{RowName(method, entry.Row)}By{Identifiers.Part(column)}";
    }

    private string RowName(string method, int row) =>
        method.StartsWith("Switching", StringComparison.Ordinal) ? "switch" + Literals.Integer(row) : Local(row) + "Rate";

    private string RowText(string method, int row) => method == "SwitchingJacobian"
        ? "Derivatives of " + TextOf(equations.Switches[row])
        : $"Derivatives of the rate of {model.States[row].Property.Name}: {model.States[row].RateText}";

    private bool IsZero(int node) => equations.Locked[node] is { Operator: Operator.Constant, Constant: 0.0 };

    private string Local(int state) => Identifiers.Local(model.States[state].Property.Name);

    private string TextOf(SwitchingFunction function) => _texts[function];
}
