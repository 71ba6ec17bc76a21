using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>What a model with vectors has besides a model without: values only, like <see cref="ModelDefinition"/>.</summary>
/// <param name="States">The vector-valued states, in the order of declaration; in the state vector they follow all others.</param>
/// <param name="Parameters">The vector-valued parameters, likewise.</param>
/// <param name="Symbols">What whole-number forms are made of: lengths first, then indices, inner loops after outer ones.</param>
/// <param name="Accesses">The elements that expressions read; payloads of element nodes count them.</param>
/// <param name="Numbers">The whole numbers that expressions use as doubles; payloads of index numbers count them.</param>
internal sealed record VectorPart(
    EquatableArray<VectorStateDefinition> States,
    EquatableArray<VectorParameterDefinition> Parameters,
    EquatableArray<SymbolDefinition> Symbols,
    EquatableArray<AccessDefinition> Accesses,
    EquatableArray<Affine> Numbers);

/// <summary>A symbol of whole-number forms.</summary>
/// <param name="Name">A wish for its name in printed code.</param>
/// <param name="Parameter">The parameter if it is a length, otherwise -1.</param>
/// <param name="Lower">The first value of an index.</param>
/// <param name="Upper">The value after the last.</param>
/// <param name="Minimum">The least value of a length that the equations can work with.</param>
internal sealed record SymbolDefinition(string Name, int Parameter, Affine Lower, Affine Upper, long Minimum)
{
    /// <summary>Any value will do.</summary>
    public const long NoMinimum = long.MinValue;

    public bool IsLength => Parameter >= 0;
}

/// <summary>An element of a vector.</summary>
/// <param name="Vector">The number of the vector among states or parameters, by the operator of the node.</param>
/// <param name="Indices">One or two.</param>
internal sealed record AccessDefinition(int Vector, EquatableArray<Affine> Indices);

/// <summary>The values an index takes within a segment of a vector.</summary>
/// <param name="Symbol">The index, or -1 where the segment is the single value <paramref name="Lower"/>.</param>
internal sealed record IndexRange(Affine Lower, Affine Upper, int Symbol);

/// <summary>Elements of a vector whose rates have one formula.</summary>
/// <param name="Ranges">One for each index.</param>
/// <param name="Rate">The rate's node.</param>
internal sealed record SegmentDefinition(EquatableArray<IndexRange> Ranges, int Rate);

/// <summary>A vector-valued state and its rate. Numbers are kept as bits.</summary>
internal sealed record VectorStateDefinition(
    PropertyDefinition Property,
    string Unit,
    long InitialBits,
    long LowerBits,
    long UpperBits,
    long? AnglePeriodBits,
    EquatableArray<Affine> Lengths,
    EquatableArray<SegmentDefinition> Segments,
    string IndexNames,
    string RateText);

/// <summary>A vector-valued parameter.</summary>
internal sealed record VectorParameterDefinition(
    PropertyDefinition Property, string Unit, long ValueBits, long LowerBits, long UpperBits, EquatableArray<Affine> Lengths);
