using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>An event as declared.</summary>
internal sealed record DeclaredEvent(IMethodSymbol Action, ISymbol Guard, bool IsCondition, int Direction, bool IsTerminal);

/// <summary>Finds the events of a model and checks their declarations.</summary>
internal sealed class EventReader(INamedTypeSymbol model, Compilation compilation, Problems problems, CancellationToken cancellation)
{
    public IReadOnlyList<DeclaredEvent> Read()
    {
        List<DeclaredEvent> events = [];
        foreach (IMethodSymbol method in model.GetMembers().OfType<IMethodSymbol>())
        {
            cancellation.ThrowIfCancellationRequested();
            if (Attributes.Find(method, Attributes.Event) is not { } mark) continue;
            bool isAction = IsAction(method);
            (ISymbol? guard, bool isCondition) = GuardOf(method, mark);
            if (!isAction || guard is null) continue;
            events.Add(new(method, guard, isCondition, Attributes.NamedEnumeration(mark, "Direction"), Attributes.Named(mark, "Terminal", false)));
        }

        return events;
    }

    private bool IsAction(IMethodSymbol method)
    {
        bool takesTime = method.Parameters is [] or [{ Type.SpecialType: SpecialType.System_Double, RefKind: RefKind.None, Name: "time" or "t" }];
        bool isPlain = method is { IsStatic: false, IsGenericMethod: false, IsAsync: false, ReturnsVoid: true };
        bool hasBody = Bodies.Find(method, compilation, cancellation) is not null;
        if (takesTime && isPlain && hasBody && !Overriding.CanBeOverridden(method, model)) return true;
        problems.Report(Descriptors.EventAction, method.Locations[0], method.Name);
        return false;
    }

    private (ISymbol? Guard, bool IsCondition) GuardOf(IMethodSymbol action, AttributeData mark)
    {
        string? name = Attributes.First<string>(mark);
        ISymbol? guard = name is null ? null : model.GetMembers(name).FirstOrDefault(IsGuard);
        if (guard is null)
        {
            problems.Report(Descriptors.EventGuard, Attributes.Place(mark, action), action.Name, name ?? "");
            return (null, false);
        }

        return (guard, TypeOf(guard)?.SpecialType == SpecialType.System_Boolean);
    }

    private bool IsGuard(ISymbol member) =>
        TypeOf(member)?.SpecialType is SpecialType.System_Double or SpecialType.System_Boolean
        && !member.IsStatic
        && member is IPropertySymbol { IsIndexer: false } or IMethodSymbol { IsGenericMethod: false, Parameters: [] or [{ Name: "time" or "t", RefKind: RefKind.None }] }
        && (Attributes.OfNumbers.Any(name => Attributes.Find(member, name) is not null)
            || (Bodies.Find(member, compilation, cancellation) is not null && !Overriding.CanBeOverridden(member, model)));

    private static ITypeSymbol? TypeOf(ISymbol member) => member switch
    {
        IPropertySymbol property => property.Type,
        IMethodSymbol method => method.ReturnType,
        _ => null,
    };
}
