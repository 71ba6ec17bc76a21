using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Algebra;

/// <summary>A symbol of a whole-number form and its factor.</summary>
internal readonly record struct AffineTerm(int Symbol, long Factor);

/// <summary>
/// A whole number of the form c + Σ factor · symbol: positions in vectors, bounds of loops, lengths. Symbols are entries of
/// <see cref="VectorPart.Symbols"/>. Equal forms compare equal: terms ascend by symbol and no factor is zero.
/// </summary>
internal sealed record Affine(long Constant, EquatableArray<AffineTerm> Terms)
{
    public static readonly Affine Zero = Of(0);

    public bool IsConstant => Terms.Count == 0;

    /// <summary>The symbol that came into being last, which is that of the innermost loop; -1 for a constant.</summary>
    public int LastSymbol => IsConstant ? -1 : Terms[Terms.Count - 1].Symbol;

    public static Affine Of(long constant) => new(constant, EquatableArray<AffineTerm>.Empty);

    public static Affine OfSymbol(int symbol) => new(0, new([new AffineTerm(symbol, 1)]));

    public long FactorOf(int symbol) => Terms.FirstOrDefault(term => term.Symbol == symbol).Factor;

    public Affine Without(int symbol) => new(Constant, new([.. Terms.Where(term => term.Symbol != symbol)]));

    public Affine Plus(long constant) => this with { Constant = Constant + constant };

    public Affine Times(long factor) => factor == 0
        ? Zero
        : new(Constant * factor, new([.. Terms.Select(term => term with { Factor = term.Factor * factor })]));

    public static Affine operator +(Affine a, Affine b) => new(a.Constant + b.Constant, new([.. a.Terms.Concat(b.Terms)
        .GroupBy(static term => term.Symbol)
        .Select(static terms => new AffineTerm(terms.Key, terms.Sum(static term => term.Factor)))
        .Where(static term => term.Factor != 0)
        .OrderBy(static term => term.Symbol)]));

    public static Affine operator -(Affine a, Affine b) => a + b.Times(-1);
}
