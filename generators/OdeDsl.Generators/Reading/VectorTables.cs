using System.Collections.Generic;
using System.Linq;
using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>A vector as equations see it.</summary>
internal sealed record VectorValue(bool IsParameter, int Vector, string Name, EquatableArray<Affine> Lengths) : Value;

/// <summary>A whole number that depends on an index or on a length.</summary>
internal sealed record IndexValue(Affine Number) : Value;

/// <summary>
/// The lengths, indices, elements and loops met while the equations of a model with vectors are read, and what is known about the values
/// of whole-number forms of them.
/// </summary>
internal sealed class VectorTables
{
    private readonly List<SymbolDefinition> _symbols = [];
    private readonly List<SplitSet?> _splits = [];
    private readonly Interned<AccessDefinition> _accesses = new();
    private readonly Interned<Affine> _numbers = new();
    private readonly HashSet<int> _loopIndices = [];
    private int _foldCount;

    /// <summary>The vectors by their properties.</summary>
    public Dictionary<ISymbol, VectorValue> Vectors { get; } = new(SymbolEqualityComparer.Default);

    /// <summary>The length parameters by their properties, with their symbols.</summary>
    public Dictionary<ISymbol, int> Lengths { get; } = new(SymbolEqualityComparer.Default);

    public IReadOnlyList<SymbolDefinition> Symbols => _symbols;

    public AccessDefinition Access(int index) => _accesses.Items[index];

    public int AddLength(string name, int parameter) =>
        Add(new(name, parameter, Affine.Zero, Affine.Zero, SymbolDefinition.NoMinimum), null);

    public int AddIndex(string name, IndexRange range, SplitSet splits) => Add(new(name, -1, range.Lower, range.Upper, 0), splits);

    private int Add(SymbolDefinition symbol, SplitSet? splits)
    {
        _symbols.Add(symbol);
        _splits.Add(splits);
        return _symbols.Count - 1;
    }

    /// <summary>The payload of a new accumulator of a loop over an index.</summary>
    public long AddFold(int symbol)
    {
        _loopIndices.Add(symbol);
        return Node.FoldPayload(symbol, _foldCount++);
    }

    /// <summary>Whether a symbol is the index of a loop that adds up.</summary>
    public bool IsLoopIndex(int symbol) => _loopIndices.Contains(symbol);

    /// <summary>Whether the range of an index depends on another one.</summary>
    public bool HasOpenRange(int symbol) => !_symbols[symbol].IsLength
        && _symbols[symbol].Lower.Terms.Concat(_symbols[symbol].Upper.Terms).Any(term => !_symbols[term.Symbol].IsLength);

    public int Intern(AccessDefinition access) => _accesses.IndexOf(access);

    public int Intern(Affine number) => _numbers.IndexOf(number);

    public VectorPart Finish(IEnumerable<VectorStateDefinition> states, IEnumerable<VectorParameterDefinition> parameters) => new(
        new([.. states]), new([.. parameters]), new([.. _symbols]), new([.. _accesses.Items]), new([.. _numbers.Items]));

    /// <summary>The least value a form can take, or null if it has none.</summary>
    public long? Minimum(Affine form)
    {
        while (form.LastSymbol is >= 0 and int last)
        {
            SymbolDefinition symbol = _symbols[last];
            long factor = form.FactorOf(last);
            if (symbol.IsLength)
            {
                if (factor < 0 || symbol.Minimum == SymbolDefinition.NoMinimum) return null;
                form = form.Without(last).Plus(factor * symbol.Minimum);
            }
            else
            {
                form = form.Without(last) + (factor > 0 ? symbol.Lower : symbol.Upper.Plus(-1)).Times(factor);
            }
        }

        return form.Constant;
    }

    private long? Maximum(Affine form) => -Minimum(form.Times(-1));

    /// <summary>Whether a form is zero or more. Null if that depends and the range of no index can be split to decide it.</summary>
    public bool? IsNotNegative(Affine form)
    {
        if (Minimum(form) >= 0) return true;
        if (Maximum(form) < 0) return false;
        if (Splittable(form) is not { } split) return null;
        // s + r changes side at s = -r, r - s behind s = r.
        Affine rest = form.Without(split.Symbol);
        Affine place = split.Factor > 0 ? rest.Times(-1) : rest.Plus(1);
        return Split(split.Symbol, place) ? true : null;
    }

    /// <summary>The sign of a form, likewise.</summary>
    public int? Sign(Affine form)
    {
        if (Minimum(form) is { } least && least >= 0 && (least > 0 || Maximum(form) == 0)) return least > 0 ? 1 : 0;
        if (Maximum(form) < 0) return -1;
        if (Splittable(form) is not { } split) return null;
        Affine zero = form.Without(split.Symbol).Times(-split.Factor);
        return Split(split.Symbol, zero) & Split(split.Symbol, zero.Plus(1)) ? 1 : null;
    }

    /// <summary>The sign of a form; lengths get larger least values if that decides it.</summary>
    public int? SignForLongVectors(Affine form)
    {
        if (Sign(form) is { } sign) return sign;
        if (Require(form.Plus(-1))) return 1;
        return Require(form.Times(-1).Plus(-1)) ? -1 : null;
    }

    /// <summary>Demands that a form of lengths is not negative: a length gets a larger least value.</summary>
    /// <returns>Whether that could be done.</returns>
    public bool Require(Affine form)
    {
        if (Minimum(form) >= 0) return true;
        if (form.Terms.Count != 1 || form.Terms[0].Factor < 0 || !_symbols[form.LastSymbol].IsLength) return false;
        (int symbol, long factor) = form.Terms[0];
        _symbols[symbol] = _symbols[symbol] with { Minimum = (-form.Constant + factor - 1) / factor };
        return true;
    }

    /// <summary>The one index that decides the form, with factor 1 or -1.</summary>
    private AffineTerm? Splittable(Affine form)
    {
        AffineTerm[] indices = [.. form.Terms.Where(term => !_symbols[term.Symbol].IsLength)];
        return indices is [{ Factor: 1 or -1 } one] ? one : null;
    }

    private bool Split(int symbol, Affine place) => _splits[symbol]!.Add(place, this);

    private sealed class Interned<T>
        where T : notnull
    {
        private readonly Dictionary<T, int> _indexOf = [];

        public List<T> Items { get; } = [];

        public int IndexOf(T item)
        {
            if (_indexOf.TryGetValue(item, out int index)) return index;
            _indexOf.Add(item, Items.Count);
            Items.Add(item);
            return Items.Count - 1;
        }
    }
}
