using System.Collections.Generic;
using System.Linq;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Fields and properties.</content>
internal sealed partial class BodyReader
{
    private readonly List<ISymbol> _initializing = [];

    private Value Field(IFieldReferenceOperation operation)
    {
        IFieldSymbol field = operation.Field;
        if (TableReader.IsTable(field.Type)) return Table(operation, field);
        if (!field.IsStatic && !BelongsToModel(operation.Instance, operation, field)) return UnknownValue.Instance;
        if (!field.IsReadOnly) return Changeable(operation, field.AssociatedSymbol ?? field);
        return At(field.IsStatic ? _scope : _receiver, () => Initial(operation, field));
    }

    private Value Property(IPropertyReferenceOperation operation)
    {
        IPropertySymbol property = operation.Property;
        if (TableReader.IsTable(property.ContainingType)) return OfTable(operation, property);
        if (operation.Arguments.Length > 0) return Unsupported(operation);
        if (TableReader.IsTable(property.Type)) return Table(operation, property);
        if (LengthOf(operation) is { } length) return length;
        if (!property.IsStatic && !BelongsToModel(operation.Instance, operation, property)) return UnknownValue.Instance;
        return At(property.IsStatic ? _scope : _receiver, () => Reached(operation, property));
    }

    private Value Reached(IPropertyReferenceOperation operation, IPropertySymbol property)
    {
        if (Part(property) is { } part) return part;
        if (VectorOrLength(property) is { } vector) return vector;
        if (IsInAction && _flow.Variables.TryGetValue(property.OriginalDefinition, out Value? set)) return set;
        if (_scope.Leaves.TryGetValue(property.OriginalDefinition, out Value? leaf)) return leaf;
        if (Attributes.OfNumbers.Any(name => Attributes.Find(property, name) is not null))
            return UnknownValue.Instance; // Its declaration has a problem that is reported there.
        bool isBaseCall = operation.Syntax is MemberAccessExpressionSyntax { Expression: BaseExpressionSyntax };
        return Reach(property, isBaseCall, operation) is IPropertySymbol reached ? Property(operation, reached) : UnknownValue.Instance;
    }

    private Value Property(IOperation operation, IPropertySymbol property)
    {
        if (property.RefKind != RefKind.None) return Unsupported(operation);
        if (Bodies.Find(property, _compilation, _cancellation) is not null) return Call(property, []);
        if (!HasSource(property) || property.IsExtern) return WithoutSource(operation, property);
        if (Bodies.IsPartial(property, _cancellation)) return Unresolved(operation); // Its other part is made by another generator.
        return property.SetMethod is null && !property.IsAbstract ? Initial(operation, property) : Changeable(operation, property);
    }

    private UnknownValue Changeable(IOperation operation, ISymbol member) => Problem(Descriptors.MutableMember, operation, member.Name);

    /// <summary>Whether the instance is the model; if not, the problem is reported.</summary>
    private bool BelongsToModel(IOperation? instance, IOperation operation, ISymbol member)
    {
        if (Unreadable.IsExtensionBlock(member.ContainingType))
        {
            Unsupported(operation);
        }
        else if (NotAFunction.Contains(member.ContainingType) && member.ContainingType.IsReferenceType)
        {
            Problem(Descriptors.NotAFunction, operation, Name(member));
        }
        else if (instance is IMemberReferenceOperation holder && !NotAFunction.Contains(holder.Member.ContainingType) && !IsSubmodel(holder.Member))
        {
            OfOther(operation);
        }
        else if (instance is null)
        {
            Unsupported(operation);
        }
        else
        {
            Value value = Evaluate(instance);
            _current = operation;
            if (value is ModelValue { Scope: var scope } && member.ContainingType.TypeKind == TypeKind.Class)
            {
                _receiver = scope;
                return true;
            }

            if (value is ModelValue) Unsupported(operation);
            else if (value is not UnknownValue) OfOther(operation);
        }

        return false;
    }

    private void OfOther(IOperation operation) => Problem(Descriptors.OtherObject, operation, UserText.Of(operation.Syntax));

    /// <summary>The member a use reaches when the object is the model; null, and reported, if derived classes decide.</summary>
    private ISymbol? Reach(ISymbol member, bool isBaseCall, IOperation operation)
    {
        if (isBaseCall || !(member.IsVirtual || member.IsAbstract || member.IsOverride) || member.IsStatic) return member;
        ISymbol reached = Overriding.Reached(member, _scope.Type);
        if (!Overriding.CanBeOverridden(reached, _scope.Type)) return reached;
        Problem(Descriptors.MemberOverridable, operation, member.Name, _scope.Type.Name);
        return null;
    }

    /// <summary>The value of a read-only field or property that only its initializer sets.</summary>
    private Value Initial(IOperation operation, ISymbol member)
    {
        if (!HasSource(member)) return WithoutSource(operation, member);
        ISymbol? behind = _initializing.FirstOrDefault(outer => !IsSetBefore(member, outer));
        if (behind is not null) return Problem(Descriptors.StaticOrder, operation, member.Name, behind.Name);
        ISymbol? reader = _initializing.LastOrDefault();
        if (reader is not null && Constructors.InitializersMention(member.ContainingType, reader, _cancellation))
            return Problem(Descriptors.StaticOrder, operation, Name(member), Name(reader));
        if (Constructors.Mention(member, _cancellation)) return Problem(Descriptors.ConstructorSetsValue, operation, member.Name);
        CallKey key = new(member, _scope, EquatableArray<Value>.Empty);
        if (_known.TryGetValue(key, out Value? known)) return known;
        return Know(key, Initializer(member) is { } initializer ? RunInitializer(member, initializer) : DefaultOf(operation, member));
    }

    private EqualsValueClauseSyntax? Initializer(ISymbol member) =>
        member.OriginalDefinition.DeclaringSyntaxReferences[0].GetSyntax(_cancellation) switch
        {
            VariableDeclaratorSyntax field => field.Initializer,
            PropertyDeclarationSyntax property => property.Initializer,
            _ => null,
        };

    private Value RunInitializer(ISymbol member, EqualsValueClauseSyntax syntax)
    {
        SemanticModel semantics = _compilation.GetSemanticModel(syntax.SyntaxTree);
        if (semantics.GetOperation(syntax, _cancellation) is not ISymbolInitializerOperation initializer)
            return Problem(Descriptors.NotResolved, syntax.GetLocation(), member.Name);
        Flow before = _flow;
        _initializing.Add(member);
        try
        {
            _flow = Start(NoVariables);
            return Evaluate(initializer.Value);
        }
        finally
        {
            _flow = before;
            _initializing.RemoveAt(_initializing.Count - 1);
        }
    }

    private Value DefaultOf(IOperation operation, ISymbol member)
    {
        ITypeSymbol? type = operation.Type;
        if (type?.SpecialType == SpecialType.System_Double) return new NumberValue(_graph.Constant(0.0));
        if (type?.SpecialType == SpecialType.System_Boolean) return new ConditionValue(_conditions.False);
        return WholeNumbers.IsWhole(type) ? new WholeValue(new ChoiceLeaf<BigInteger>(BigInteger.Zero)) : Changeable(operation, member);
    }

    /// <summary>
    /// Whether a static member has its value when the initializer of <paramref name="outer"/> runs: static initializers of a type run
    /// in the order of their text, and the order of several files is open.
    /// </summary>
    private static bool IsSetBefore(ISymbol member, ISymbol outer)
    {
        INamedTypeSymbol type = member.ContainingType.OriginalDefinition;
        bool isSameType = SymbolEqualityComparer.Default.Equals(type, outer.ContainingType.OriginalDefinition);
        if (!member.IsStatic || !outer.IsStatic || !isSameType) return true;
        Location first = member.OriginalDefinition.Locations[0];
        Location second = outer.OriginalDefinition.Locations[0];
        return first.SourceTree == second.SourceTree && first.SourceSpan.Start < second.SourceSpan.Start;
    }

    private bool HasSource(ISymbol member) =>
        member.OriginalDefinition.DeclaringSyntaxReferences.Any(reference => _compilation.ContainsSyntaxTree(reference.SyntaxTree));

    private UnknownValue WithoutSource(IOperation operation, ISymbol member) => NotAFunction.Contains(member.ContainingType)
        ? Problem(Descriptors.NotAFunction, operation, Name(member))
        : Problem(Descriptors.SourceUnknown, operation, Name(member));

    private static string Name(ISymbol member) => member.ContainingType is null
        ? member.Name
        : member.ContainingType.ToDisplayString(SymbolDisplayFormat.MinimallyQualifiedFormat) + "." + member.Name;
}
