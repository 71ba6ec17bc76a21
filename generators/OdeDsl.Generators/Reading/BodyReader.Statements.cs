using System.Runtime.CompilerServices;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Statements.</content>
internal sealed partial class BodyReader
{
    private void Execute(IOperation statement)
    {
        _cancellation.ThrowIfCancellationRequested();
        RuntimeHelpers.EnsureSufficientExecutionStack();
        _current = statement;
        switch (statement)
        {
            case IBlockOperation block:
                foreach (IOperation inner in block.Operations)
                {
                    if (IsOver(_flow)) break;
                    Execute(inner);
                }

                break;
            case IVariableDeclarationGroupOperation group:
                foreach (IVariableDeclarationOperation declaration in group.Declarations) Declare(declaration);
                break;
            case IExpressionStatementOperation { Operation: IInvocationOperation call }:
                Problem(Descriptors.StatementNotSupported, call, "A call whose result is not used", "use its result, or remove it");
                break;
            case IExpressionStatementOperation expression:
                Evaluate(expression.Operation);
                break;
            case IReturnOperation { Kind: OperationKind.Return, ReturnedValue: { } value }:
                Return(Evaluate(value));
                break;
            case IReturnOperation { Kind: OperationKind.Return, ReturnedValue: null } when IsInAction:
                ReturnFromAction();
                break;
            case IConditionalOperation branch:
                Fork(
                    Condition(branch.Condition),
                    () => Execute(branch.WhenTrue),
                    () =>
                    {
                        if (branch.WhenFalse is not null) Execute(branch.WhenFalse);
                    });
                break;
            case ISwitchOperation choice:
                Switch(choice);
                break;
            case IForLoopOperation loop:
                Loop(loop);
                break;
            case IBranchOperation { BranchKind: BranchKind.Break }:
                Break();
                break;
            case ILabeledOperation { Operation: { } labeled }:
                Execute(labeled);
                break;
            case IEmptyOperation or ILocalFunctionOperation:
                break;
            case IInvalidOperation:
                Unresolved(statement);
                break;
            default:
                (string what, string instead) = Unreadable.Describe(statement);
                Problem(Descriptors.StatementNotSupported, Unreadable.Place(statement), what, instead);
                break;
        }
    }

    private void Declare(IVariableDeclarationOperation declaration)
    {
        foreach (IVariableDeclaratorOperation declarator in declaration.Declarators)
        {
            IVariableInitializerOperation? initializer = declarator.Initializer ?? declaration.Initializer;
            if (initializer is null) continue;
            Value value = declarator.Symbol.IsRef
                ? Problem(Descriptors.ExpressionNotSupported, declarator, "A reference", "use a plain local variable")
                : Evaluate(initializer.Value);
            Assign(declarator.Symbol, value);
        }
    }

    /// <summary>All executions that are still on the way return; those that broke out of a switch before do not.</summary>
    private void Return(Value value)
    {
        int elsewhere = _conditions.Or(_flow.Broken, _flow.Outside);
        Value result = _flow.Result is null ? value : Choose(_flow.Returned, _flow.Result, value);
        _flow = _flow with { Returned = _conditions.Or(_flow.Returned, _conditions.Not(elsewhere)), Result = result };
    }

    /// <summary>All executions that are still on the way leave the switch; those that returned before do not.</summary>
    private void Break()
    {
        var after = _flow.Broken == _conditions.False ? _flow.Variables : Join(_flow.Broken, _flow.AfterBreak, _flow.Variables);
        _flow = _flow with { Broken = _conditions.Or(_flow.Broken, _conditions.Not(_flow.Returned)), AfterBreak = after };
    }
}
