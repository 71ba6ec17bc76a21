using System.Collections.Generic;
using System.Linq;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Units;

/// <summary>The units that attributes state: by <c>Unit = "..."</c> in any modelling attribute, or by <c>[Unit("...")]</c>.</summary>
internal sealed class StatedUnits(Problems problems, CancellationToken cancellation)
{
    private const string Unit = "Unit";

    private readonly Dictionary<ISymbol, Unit?> _known = new(SymbolEqualityComparer.Default);

    /// <summary>Whether a member states a unit, readable or not.</summary>
    public static bool IsStated(ISymbol symbol) => Statements(symbol).Any();

    /// <summary>The unit of a member, argument or result; null where none is stated or it cannot be read, which is reported.</summary>
    public Unit? Of(ISymbol symbol)
    {
        symbol = symbol.OriginalDefinition;
        if (_known.TryGetValue(symbol, out Unit? known)) return known;
        Unit? unit = null;
        foreach ((AttributeData attribute, string text) in Statements(symbol)) unit ??= Read(attribute, Unit, text, symbol);
        _known.Add(symbol, unit);
        return unit;
    }

    /// <summary>The unit of time of a model, or null.</summary>
    public Unit? OfTime(INamedTypeSymbol model)
    {
        const string Argument = "TimeUnit";
        if (Attributes.Find(model, Attributes.Model) is not { } mark) return null;
        if (Attributes.Named(mark, Argument, "") is not { Length: > 0 } text) return null;
        Unit? unit = Read(mark, Argument, text, model);
        if (unit is null || unit.Dimension.Equals(Dimension.Of("T"))) return unit;
        problems.Report(Descriptors.UnitNotRead, Place(mark, Argument, model), text, model.Name, "expected a unit of time, such as 's', 'min', 'h' or 'd'");
        return null;
    }

    private Unit? Read(AttributeData attribute, string argument, string text, ISymbol symbol)
    {
        (Unit? unit, string? fault) = UnitParser.Parse(text);
        if (fault is not null && IsInSource(attribute))
            problems.Report(Descriptors.UnitNotRead, Place(attribute, argument, symbol), text, symbol.Name, fault);
        return unit;
    }

    private static IEnumerable<(AttributeData Attribute, string Text)> Statements(ISymbol symbol)
    {
        IEnumerable<AttributeData> all = symbol is IMethodSymbol method
            ? method.GetAttributes().Concat(method.GetReturnTypeAttributes())
            : symbol.GetAttributes();
        foreach (AttributeData attribute in all)
        {
            if (!Attributes.IsOurs(attribute)) continue;
            string? text = Attributes.Is(attribute, Unit) ? Attributes.First<string>(attribute) : Attributes.Named(attribute, Unit, "");
            if (text is { Length: > 0 }) yield return (attribute, text);
        }
    }

    private static bool IsInSource(AttributeData attribute) => attribute.ApplicationSyntaxReference is not null;

    /// <summary>Where the text of a unit stands.</summary>
    private Location Place(AttributeData attribute, string argument, ISymbol symbol)
    {
        AttributeSyntax? syntax = attribute.ApplicationSyntaxReference?.GetSyntax(cancellation) as AttributeSyntax;
        IEnumerable<AttributeArgumentSyntax> arguments = syntax?.ArgumentList?.Arguments ?? [];
        AttributeArgumentSyntax? found = arguments.FirstOrDefault(item => item.NameEquals?.Name.Identifier.ValueText == argument)
            ?? arguments.FirstOrDefault(static item => item.NameEquals is null);
        return found?.Expression.GetLocation() ?? Attributes.Place(attribute, symbol);
    }
}
