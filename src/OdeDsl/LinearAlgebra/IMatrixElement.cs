namespace OdeDsl.LinearAlgebra;

/// <summary>An entry of a matrix that an unrolled elimination runs on: real or complex.</summary>
/// <typeparam name="TElement">The implementing type itself.</typeparam>
public interface IMatrixElement<TElement>
    where TElement : struct, IMatrixElement<TElement>
{
    /// <summary>A real number.</summary>
    /// <param name="value">The number.</param>
    static abstract TElement Real(double value);

    /// <summary>The sum.</summary>
    /// <param name="left">First term.</param>
    /// <param name="right">Second term.</param>
    static abstract TElement operator +(TElement left, TElement right);

    /// <summary>The difference.</summary>
    /// <param name="left">What is subtracted from.</param>
    /// <param name="right">What is subtracted.</param>
    static abstract TElement operator -(TElement left, TElement right);

    /// <summary>The product.</summary>
    /// <param name="left">First factor.</param>
    /// <param name="right">Second factor.</param>
    static abstract TElement operator *(TElement left, TElement right);

    /// <summary>One over the number; not finite for zero.</summary>
    /// <param name="value">The number.</param>
    static abstract TElement Inverse(TElement value);

    /// <summary>The magnitude, or a number up to √2 times as large.</summary>
    /// <param name="value">The number.</param>
    static abstract double Size(TElement value);
}
