using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>Finds the rates and observables of a model and checks their declarations. Their bodies are read elsewhere.</summary>
internal sealed class EquationReader(
    INamedTypeSymbol model, PropertyReader properties, Compilation compilation, Problems problems, CancellationToken cancellation)
{
    private readonly Dictionary<string, ISymbol?> _rates = [];

    public List<(ISymbol Member, string Unit)> Observables { get; } = [];

    /// <summary>The member that computes the rate of a state, or null where it is missing or cannot be read.</summary>
    public ISymbol? RateOf(string state) => _rates.TryGetValue(state, out ISymbol? member) ? member : null;

    public void Read()
    {
        foreach (ISymbol member in model.GetMembers())
        {
            cancellation.ThrowIfCancellationRequested();
            if (Attributes.OfNumbers.Any(name => Attributes.Find(member, name) is not null)) continue;
            if (Attributes.Find(member, Attributes.Rate) is { } rate) ReadRate(member, rate);
            if (Attributes.Find(member, Attributes.Observable) is { } observable) ReadObservable(member, observable);
        }

        foreach (ISymbol state in properties.States.Select(static state => state.Symbol).Concat(properties.VectorStates.Select(static state => state.Symbol)))
        {
            if (!_rates.ContainsKey(state.Name)) problems.Report(Descriptors.MissingRate, state.Locations[0], state.Name);
        }
    }

    private void ReadRate(ISymbol member, AttributeData attribute)
    {
        Location place = Attributes.Place(attribute, member);
        string? name = Attributes.First<string>(attribute);
        DeclaredVector? vector = properties.VectorStates.FirstOrDefault(state => state.Property.Name == name);
        bool isOfFailed = name is not null && properties.FailedStates.Contains(name);
        bool readable = IsReadable(member, Attributes.Rate, vector, isOfFailed);
        if (name is null)
        {
            problems.Report(Descriptors.AttributeNotReadable, place, Attributes.Rate, member.Name);
            return;
        }

        bool isState = properties.States.Any(state => state.Property.Name == name) || vector is not null || properties.FailedStates.Contains(name);
        if (!isState && model.GetMembers(name).IsEmpty)
            problems.Report(Descriptors.RateOfUnknownMember, place, member.Name, name, model.Name);
        else if (!isState)
            problems.Report(Descriptors.RateOfOtherMember, place, member.Name, name);
        else if (_rates.TryGetValue(name, out ISymbol? first) && first is not null)
            problems.Report(Descriptors.SecondRate, place, name, first.Name, member.Name);
        else
            _rates[name] = readable ? member : null;
    }

    private void ReadObservable(ISymbol member, AttributeData attribute)
    {
        if (!IsReadable(member, Attributes.Observable, null)) return;
        string? unit = Attributes.Named(attribute, "Unit", "");
        if (Observables.Any(other => other.Member.Name == member.Name))
            problems.Report(Descriptors.DuplicateObservable, member.Locations[0], member.Name);
        else
            Observables.Add((member, unit ?? ""));
    }

    /// <summary>Whether a member can be an equation; if not, the problem is reported.</summary>
    public bool IsReadable(ISymbol member, string role, DeclaredVector? vector, bool isOfFailed = false)
    {
        Location place = member.Locations[0];
        ITypeSymbol? type = member switch
        {
            IPropertySymbol property => property.Type,
            IMethodSymbol method => method.ReturnType,
            _ => null,
        };
        if (member.IsStatic) problems.Report(Descriptors.EquationStatic, place, role, member.Name);
        else if (member is IMethodSymbol { IsGenericMethod: true }) problems.Report(Descriptors.EquationGeneric, place, role, member.Name);
        else if (type?.SpecialType != SpecialType.System_Double)
            problems.Report(Descriptors.EquationNotDouble, TypePlace(member) ?? place, role, member.Name, type?.ToDisplayString() ?? "");
        else if (vector is not null && !TakesIndices(member, vector.Lengths.Count))
            problems.Report(Descriptors.RateIndices, place, member.Name, vector.Property.Name, vector.Lengths.Count == 1 ? "one int" : "two ints");
        else if (vector is null && !isOfFailed && !TakesOnlyTime(member)) problems.Report(Descriptors.EquationArguments, place, role, member.Name);
        else if (Bodies.Find(member, compilation, cancellation) is null)
            problems.Report(Descriptors.EquationWithoutBody, place, role, member.Name);
        else if (Overriding.CanBeOverridden(member, model)) problems.Report(Descriptors.MemberOverridable, place, member.Name, model.Name);
        else return true;
        return false;
    }

    /// <summary>Whether the member takes nothing, or the time under a usual name: another number would silently get the time.</summary>
    private static bool TakesOnlyTime(ISymbol member) => member switch
    {
        IMethodSymbol { Parameters: [var parameter] } =>
            parameter is { Type.SpecialType: SpecialType.System_Double, RefKind: RefKind.None, Name: "time" or "t" },
        IMethodSymbol { Parameters: [] } => true,
        IPropertySymbol { IsIndexer: false } => true,
        _ => false,
    };

    /// <summary>Whether the member takes the indices of an element and, apart from them, at most the time.</summary>
    private static bool TakesIndices(ISymbol member, int count) => member is IMethodSymbol method
        && method.Parameters.All(static parameter => parameter.RefKind == RefKind.None)
        && method.Parameters.Count(static parameter => parameter.Type.SpecialType == SpecialType.System_Int32) == count
        && method.Parameters.Where(static parameter => parameter.Type.SpecialType != SpecialType.System_Int32).ToArray() is []
            or [{ Type.SpecialType: SpecialType.System_Double, Name: "time" or "t" }];

    private Location? TypePlace(ISymbol member) =>
        member.DeclaringSyntaxReferences.FirstOrDefault()?.GetSyntax(cancellation) switch
        {
            PropertyDeclarationSyntax property => property.Type.GetLocation(),
            MethodDeclarationSyntax method => method.ReturnType.GetLocation(),
            _ => null,
        };
}
