namespace OdeDsl.Scalars;

/// <summary>
/// What the vector widths have in common below the level of a formula, so that a function is written once for all of them. A mask is a
/// vector whose lanes have all bits set or none; the conditions of <see cref="IScalar{TScalar}"/> are masks.
/// </summary>
internal interface ILanes<TLanes> : IScalar<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    static abstract TLanes Abs(TLanes x);

    /// <summary>The nearest whole number, ties to even.</summary>
    static abstract TLanes Round(TLanes x);

    static abstract TLanes And(TLanes left, TLanes right);

    /// <summary>Left where right is not set.</summary>
    static abstract TLanes AndNot(TLanes left, TLanes right);

    static abstract bool All(TLanes mask);

    /// <summary>The mantissa in [√½, √2) and the binary exponent of positive normal numbers.</summary>
    static abstract (TLanes Mantissa, TLanes Exponent) Split(TLanes x);

    /// <summary>Sine and cosine.</summary>
    static abstract (TLanes Sine, TLanes Cosine) SinCos(TLanes x);

    /// <summary>Applies a function lane by lane.</summary>
    static abstract TLanes Map(Func<double, double> function, TLanes x);

    /// <summary>Applies a function of two arguments lane by lane.</summary>
    static abstract TLanes Map(Func<double, double, double> function, TLanes x, TLanes y);
}
