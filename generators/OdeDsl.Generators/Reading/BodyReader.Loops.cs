using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Loops over an index: short ones are written out, the others become sums.</content>
internal sealed partial class BodyReader
{
    /// <summary>Passes of a loop up to which it is written out.</summary>
    private const int LongestUnrolled = 16;

    /// <summary>The same in a model without vectors, where every equation is written out.</summary>
    private const int LongestInFlatModel = 1000;

    private void Loop(IForLoopOperation loop)
    {
        if (Header(loop) is not { } header) return;
        Affine passes = header.End - header.First;
        bool isFlat = _vectors.Vectors.Count + _vectors.Lengths.Count == 0;
        if (passes.IsConstant && passes.Constant <= (isFlat ? LongestInFlatModel : LongestUnrolled))
        {
            for (long k = 0; k < passes.Constant; k++) Pass(loop, header.Index, header.First.Plus(k));
            return;
        }

        if (isFlat)
        {
            Problem(Descriptors.LoopNotSupported, Unreadable.Place(loop), "in a model without vectors it has too many passes");
            return;
        }

        SplitSet splits = new(header.First, header.End);
        Flow start = _flow;
        (int, int) mark = Mark;
        int splitsBefore;
        do
        {
            splitsBefore = splits.Count;
            GoBackTo(mark);
            _flow = start;
            foreach (IndexRange range in splits.Segments(header.Index.Name, _vectors))
            {
                if (range.Symbol < 0) Pass(loop, header.Index, range.Lower);
                else Fold(loop, header.Index, range.Symbol);
            }
        }
        while (splits.Count != splitsBefore);
    }

    /// <summary>The index of a loop <c>for (int k = first; k &lt; end; k++)</c> and its range; null with a problem reported.</summary>
    private (ILocalSymbol Index, Affine First, Affine End)? Header(IForLoopOperation loop)
    {
        IVariableDeclaratorOperation? declared = loop.Before.OfType<IVariableDeclarationGroupOperation>()
            .SelectMany(static group => group.Declarations).SelectMany(static declaration => declaration.Declarators).FirstOrDefault();
        ILocalSymbol? index = declared?.Symbol;
        bool countsUp = loop is { Before.Length: 1, AtLoopBottom: [IExpressionStatementOperation { Operation: var step }] } && CountsUp(step, index);
        bool isUpTo = loop.Condition is IBinaryOperation
        {
            OperatorKind: BinaryOperatorKind.LessThan or BinaryOperatorKind.LessThanOrEqual,
            LeftOperand: ILocalReferenceOperation { Local: var compared },
        } && SymbolEqualityComparer.Default.Equals(compared, index);
        if (!countsUp || !isUpTo || index is null || loop.Condition is not IBinaryOperation condition
            || declared is not { Initializer.Value: { } initial, Symbol.Type.SpecialType: SpecialType.System_Int32 }
            || Assigned(loop.Body).Contains(index, SymbolEqualityComparer.Default))
        {
            Problem(Descriptors.LoopNotSupported, Unreadable.Place(loop), "it does not count an int up by one");
            return null;
        }

        Value first = Evaluate(initial), end = Evaluate(condition.RightOperand);
        if (first is UnknownValue || end is UnknownValue) return null;
        if (AffineOf(first) is not { } from || AffineOf(end) is not { } to)
        {
            Problem(Descriptors.LoopNotSupported, Unreadable.Place(loop), "its range depends on conditions");
            return null;
        }

        return (index, from, condition.OperatorKind == BinaryOperatorKind.LessThan ? to : to.Plus(1));
    }

    private static bool CountsUp(IOperation step, ILocalSymbol? index) => step switch
    {
        IIncrementOrDecrementOperation { Kind: OperationKind.Increment, Target: ILocalReferenceOperation target } =>
            SymbolEqualityComparer.Default.Equals(target.Local, index),
        ICompoundAssignmentOperation
        {
            OperatorKind: BinaryOperatorKind.Add, Target: ILocalReferenceOperation target, Value.ConstantValue: { HasValue: true, Value: 1 }
        } => SymbolEqualityComparer.Default.Equals(target.Local, index),
        _ => false,
    };

    /// <summary>The variables that a statement assigns to.</summary>
    private static IEnumerable<ISymbol> Assigned(IOperation statement) => statement.DescendantsAndSelf()
        .Select(static operation => operation switch
        {
            IAssignmentOperation assignment => assignment.Target,
            IIncrementOrDecrementOperation step => step.Target,
            _ => null,
        })
        .Select(static target => target switch
        {
            ILocalReferenceOperation local => local.Local,
            IParameterReferenceOperation parameter => (ISymbol)parameter.Parameter,
            _ => null,
        })
        .Where(static symbol => symbol is not null)
        .Select(static symbol => symbol!)
        .Distinct<ISymbol>(SymbolEqualityComparer.Default);

    /// <summary>One pass of a loop with a known index.</summary>
    private void Pass(IForLoopOperation loop, ILocalSymbol index, Affine value)
    {
        Flow before = _flow;
        Assign(index, WholeOf(value));
        Execute(loop.Body);
        RequireToRunThrough(loop, before);
    }

    /// <summary>All passes of a loop at once: the variables it adds to become sums.</summary>
    private void Fold(IForLoopOperation loop, ILocalSymbol index, int symbol)
    {
        Flow before = _flow;
        ISymbol[] changed = [.. Assigned(loop.Body).Where(before.Variables.ContainsKey)];
        Dictionary<ISymbol, int> accumulators = new(SymbolEqualityComparer.Default);
        Assign(index, new IndexValue(Affine.OfSymbol(symbol)));
        foreach (ISymbol variable in changed)
        {
            if (before.Variables[variable] is not NumberValue)
            {
                if (before.Variables[variable] is not UnknownValue)
                    Problem(Descriptors.LoopIsNoSum, Unreadable.Place(loop), variable.Name);
                return;
            }

            accumulators.Add(variable, _graph.Intern(new Node(Operator.Accumulator, -1, -1, -1, _vectors.AddFold(symbol))));
            Assign(variable, new NumberValue(accumulators[variable]));
        }

        Execute(loop.Body);
        if (!RequireToRunThrough(loop, before)) return;
        HashSet<int> leaves = [.. accumulators.Values];
        foreach (ISymbol variable in changed)
        {
            Value first = before.Variables[variable];
            before = before with { Variables = before.Variables.SetItem(variable, Folded(loop, variable, accumulators[variable], first, leaves)) };
        }

        _flow = before;
    }

    private Value Folded(IForLoopOperation loop, ISymbol variable, int accumulator, Value first, HashSet<int> leaves)
    {
        if (_flow.Variables[variable] is not NumberValue next) return UnknownValue.Instance;
        if (next.Node == accumulator) return first;
        if (!IsSum(next.Node, accumulator, leaves)) return Problem(Descriptors.LoopIsNoSum, Unreadable.Place(loop), variable.Name);
        return new NumberValue(_graph.Intern(
            new Node(Operator.Fold, ((NumberValue)first).Node, next.Node, -1, _graph[accumulator].Payload)));
    }

    /// <summary>Whether an expression adds to an accumulator only what no accumulator of the loop is part of.</summary>
    private bool IsSum(int node, int accumulator, HashSet<int> leaves)
    {
        if (node == accumulator) return true;
        Node sum = _graph[node];
        return sum.Operator switch
        {
            Operator.Add => (IsSum(sum.First, accumulator, leaves) && IsFree(sum.Second)) || (IsFree(sum.First) && IsSum(sum.Second, accumulator, leaves)),
            Operator.Subtract or Operator.Fold => IsSum(sum.First, accumulator, leaves) && IsFree(sum.Second),
            Operator.Conditional => IsFree(sum.First) && IsSum(sum.Second, accumulator, leaves) && IsSum(sum.Third, accumulator, leaves),
            _ => false,
        };

        bool IsFree(int other) => !Algebra.Reach.Of(_graph, [other]).Any(leaves.Contains);
    }

    /// <summary>Whether no execution left the loop early; if one did, the problem is reported.</summary>
    private bool RequireToRunThrough(IForLoopOperation loop, Flow before)
    {
        if (_flow.Returned == before.Returned && _flow.Broken == before.Broken) return true;
        Problem(Descriptors.LoopNotSupported, Unreadable.Place(loop), "it is left before its end");
        return false;
    }
}
