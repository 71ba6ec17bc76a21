using System.Collections.Generic;
using System.Linq;
using System.Threading;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>What is computed for the events of a model.</summary>
/// <param name="Guards">The guards, nodes of the locked graph.</param>
/// <param name="GuardJacobian">Their derivatives by the states.</param>
/// <param name="GuardByTime">Their derivatives by time.</param>
/// <param name="Actions">For each event the states and modes it sets, nodes of the free graph.</param>
/// <param name="ActionJacobian">The derivatives of those states by the states, n rows for each event, nodes of the free graph.</param>
/// <param name="ActionByTime">Their derivatives by time.</param>
internal sealed record EventEquations(
    IReadOnlyList<int> Guards,
    SparseMatrix GuardJacobian,
    IReadOnlyList<int> GuardByTime,
    IReadOnlyList<int> Actions,
    SparseMatrix ActionJacobian,
    IReadOnlyList<int> ActionByTime)
{
    /// <remarks>
    /// Actions are not locked: an event happens at one point, where the conditions in its action hold or do not, and the derivatives of the
    /// expressions as written are those of the side taken.
    /// </remarks>
    public static EventEquations Of(
        ModelDefinition model, ExpressionGraph free, SparseMatrix guardJacobian, IReadOnlyList<int> guards, IReadOnlyList<int> guardByTime,
        CancellationToken cancellationToken)
    {
        int[] actions = [.. model.Events.SelectMany(static item => item.States.Concat(item.Modes))];
        DerivativeTable derivatives = new(free, [.. model.Events.SelectMany(static item => item.States)]);
        SparseMatrix byState = derivatives.By(Operator.State, model.States.Count, cancellationToken);
        int[] byTime = derivatives.ByTime(model.Inputs.Count, cancellationToken);
        return new(guards, guardJacobian, guardByTime, BranchGuard.Apply(free, actions), Quieted(free, byState), Quiet.Forms(free, byTime));
    }

    private static SparseMatrix Quieted(ExpressionGraph free, SparseMatrix matrix)
    {
        int[] quiet = Quiet.Forms(free, [.. matrix.Entries.Select(static entry => entry.Node)]);
        return new(matrix.Rows, matrix.Columns, [.. matrix.Entries.Select((entry, i) => entry with { Node = quiet[i] })]);
    }
}
