using System.Collections.Generic;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Tables: passed on like any value, and read by <c>At</c>.</content>
internal sealed partial class BodyReader
{
    private readonly List<ISymbol> _tableSymbols = [];
    private readonly List<TableDefinition> _tables = [];

    /// <summary>The tables read so far.</summary>
    public IReadOnlyList<TableDefinition> Tables => _tables;

    private Value Table(IOperation operation, ISymbol member)
    {
        int known = _tableSymbols.FindIndex(other => SymbolEqualityComparer.Default.Equals(other, member));
        if (known >= 0) return new TableReference(known);
        if (Attributes.Find(member, Attributes.Table) is not { } mark)
            return Problem(Descriptors.TableNotMarked, operation, Name(member));
        bool isOwn = SymbolEqualityComparer.Default.Equals(member.ContainingType, _scope.Type);
        if (!TableReader.IsFixed(member, _compilation, _cancellation))
            return isOwn ? UnknownValue.Instance : Problem(Descriptors.TableNotFixed, operation, Name(member)); // The model's own is reported where it is declared.
        if (!_compilation.IsSymbolAccessibleWithin(member, Outermost(_scope).Type)) return Problem(Descriptors.TableNotAccessible, operation, Name(member), Outermost(_scope).Type.Name);
        _tableSymbols.Add(member);
        _tables.Add(TableReader.Define(member, mark));
        return new TableReference(_tables.Count - 1);
    }

    private Value TableCall(IInvocationOperation operation)
    {
        if (operation.TargetMethod is not { Name: "At", Parameters.Length: 1 } || operation.Instance is null)
            return OfTable(operation, operation.TargetMethod);
        Value table = Evaluate(operation.Instance);
        Value argument = Evaluate(operation.Arguments[0].Value);
        _current = operation;
        if (table is not TableReference { Index: var index }) return table is UnknownValue ? table : Unsupported(operation);
        if (argument is UnknownValue) return argument;
        int node = TableNodes.Value(_graph, index, Node(argument));
        Remember(node, UserText.Of(operation.Syntax));
        return new NumberValue(node);
    }

    private UnknownValue OfTable(IOperation operation, ISymbol member) =>
        Problem(Descriptors.TableMemberNotSupported, operation, UserText.Of(operation.Syntax), member.Name);
}
