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

    /// <summary>Entries up to which a dense Jacobian is printed on its own, about the size of a method.</summary>
    private const int LargestDenseEntryCount = 400;

    /// <summary>Operations up to which an elimination is printed; beyond, loops over vectors win (benchmarks/README.md).</summary>
    private const int LargestEliminationCount = 1000;

    private readonly SwitchTexts _texts = new(model, equations);

    private readonly BodyWriter _body = new(
        writer,
        new ModelNames(model),
        new Dictionary<string, int>
        {
            ["state"] = model.States.Count,
            ["parameters"] = model.ConstantCount,
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
        // Locked rates never throw, those as written may.
        bool canThrow = Reach.Of(equations.Free, equations.Rates).Exists(index => Quiet.CanThrow(equations.Free[index].Operator));
        if (equations.Switches.Count > 0 || canThrow)
            Member(new Quantity("Rates", LockedPoint, "rates", model.States.Count, equations.Locked, Rates(equations.LockedRates)));
        else
            WriteUnlockedRates();
        WriteJacobian("StateJacobian", equations.StateJacobian, "StateSparsity");
        WriteJacobian("ParameterJacobian", equations.ParameterJacobian, "ParameterSparsity");
        Member(Vector("TimeDerivative", LockedPoint, "derivative", equations.TimeDerivative));
        Member(Vector("JacobianVectorProduct", [.. LockedPoint, "direction"], "product", equations.JacobianVectorProduct));
        Member(Observables());
        WriteSwitching();
        foreach (Quantity quantity in EventQuantities.Of(model, equations)) Member(quantity);
        WriteGenericForms();
        if (Elimination.Of(equations.StateJacobian, LargestEliminationCount, cancellationToken) is { } elimination)
            new EliminationWriter(writer, model, elimination).Write();
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

    /// <summary>
    /// A matrix in both forms. The dense form of a large one is spread out from its entries: twice the code would cost more than that pass.
    /// </summary>
    private void WriteJacobian(string method, SparseMatrix matrix, string sparsity)
    {
        Quantity dense = Matrix(method, "jacobian", matrix, dense: true);
        if (matrix.Entries.Count <= LargestDenseEntryCount)
        {
            Member(dense);
        }
        else
        {
            writer.Line();
            writer.Line("/// <inheritdoc/>");
            writer.Open($"public static void {method}({Signatures.Parameters(dense)})");
            writer.Line($"{method}Values(time, state, parameters, regime, jacobian[..{Literals.Integer(matrix.Entries.Count)}]);");
            writer.Line($"Description.{sparsity}.Expand(jacobian);");
            writer.Close();
        }

        Member(Matrix(method + "Values", "values", matrix, dense: false));
    }

    /// <summary>Rates and switching functions once more, over any kind of number; left out as a whole where one of them does not fit.</summary>
    private void WriteGenericForms()
    {
        BodyPlan[] plans = [.. GenericQuantities().Select(_body.Plan)];
        if (!plans.All(static plan => plan.Fits)) return;
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Line("public static bool HasGenericForms => true;");
        foreach (BodyPlan plan in plans) Member(plan);
        if (equations.Switches.Count > 0) return;
        Quantity locked = new("RatesOver", LockedPoint, "rates", 0, equations.Locked, []) { Kind = NumberKind.Scalar };
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        writer.Line($"public static void {Signatures.Head("RatesOver", locked)} => RatesOver(time, state, parameters, rates);");
    }

    private IEnumerable<Quantity> GenericQuantities()
    {
        int count = model.States.Count;
        yield return new("RatesOver", Point, "rates", count, equations.Free, Rates(equations.GenericRates)) { Kind = NumberKind.Scalar };
        if (equations.Switches.Count > 0)
        {
            yield return new("RatesOver", LockedPoint, "rates", count, equations.Locked, Rates(equations.GenericLockedRates))
            {
                Kind = NumberKind.Scalar,
            };
        }

        yield return SwitchingFunctions("SwitchingFunctionsOver", equations.GenericSwitches) with { Kind = NumberKind.Scalar };
    }

    private Quantity SwitchingFunctions(string method, IReadOnlyList<int> values) => new(
        method, LockedPoint, "values", values.Count, equations.Locked, [.. values.Select(
            (value, i) => new Result(value, i, "switch" + Literals.Integer(i), TextOf(equations.Switches[i])))]);

    private void WriteSwitching()
    {
        int count = equations.Switches.Count;
        Member(SwitchingFunctions("SwitchingFunctions", [.. equations.Switches.Select(static function => function.Value)]));
        Member(Matrix("SwitchingJacobian", "jacobian", equations.SwitchingJacobian, dense: true));
        Member(Vector("SwitchingTimeDerivative", LockedPoint, "derivative", equations.SwitchingTimeDerivative));
        Member(new Quantity("Regime", Point, "regime", count, equations.Free, [.. equations.Switches.Select(
            (function, i) => new Result(function.Decision, i, "side" + Literals.Integer(i), TextOf(function)))]));
    }

    private void Member(Quantity quantity) => Member(_body.Plan(quantity));

    private void Member(BodyPlan plan)
    {
        cancellationToken.ThrowIfCancellationRequested();
        writer.Line();
        writer.Line("/// <inheritdoc/>");
        _body.Write(plan);
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
        string column = method.StartsWith("Parameter", StringComparison.Ordinal)
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
