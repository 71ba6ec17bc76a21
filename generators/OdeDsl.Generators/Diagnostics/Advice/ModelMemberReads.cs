using System;
using System.Collections.Concurrent;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Diagnostics;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Diagnostics.Advice;

/// <summary>
/// The names of a model's members that its code reads. Names, not symbols: the two parts of a partial property are two symbols, and
/// to confuse overloads only means to advise less.
/// </summary>
internal sealed class ModelMemberReads
{
    private readonly ConcurrentDictionary<string, bool> _names = new();

    /// <summary>Watches the code of one model, and hands the reads over when all of it has been seen.</summary>
    public static void Watch(AnalysisContext context, Action<SymbolAnalysisContext, INamedTypeSymbol, ModelMemberReads> atEnd) =>
        context.RegisterSymbolStartAction(
            start =>
            {
                INamedTypeSymbol model = (INamedTypeSymbol)start.Symbol;
                if (!ModelCode.IsModel(model)) return;
                ModelMemberReads reads = new();
                reads.AddNamesInAttributes(model);
                start.RegisterOperationAction(operation => reads.Add((IPropertyReferenceOperation)operation.Operation), OperationKind.PropertyReference);
                start.RegisterSymbolEndAction(end => atEnd(end, model, reads));
            },
            SymbolKind.NamedType);

    public bool Contains(ISymbol member) => _names.ContainsKey(member.Name);

    private void Add(IPropertyReferenceOperation reference)
    {
        bool isTarget = reference.Parent is ISimpleAssignmentOperation assignment && assignment.Target == reference;
        if (!isTarget && reference.Parent is not INameOfOperation) _names[reference.Property.Name] = true;
    }

    /// <summary>An attribute can name a member as the length of a vector, say. To be named as what a rate belongs to is no use.</summary>
    private void AddNamesInAttributes(INamedTypeSymbol model)
    {
        foreach (AttributeData attribute in model.GetMembers().SelectMany(static member => member.GetAttributes()))
        {
            if (Attributes.Is(attribute, Attributes.Rate)) continue;
            foreach (TypedConstant argument in attribute.ConstructorArguments.Concat(attribute.NamedArguments.Select(static named => named.Value)))
            {
                if (argument.Kind == TypedConstantKind.Primitive && argument.Value is string name) _names[name] = true;
            }
        }
    }
}
