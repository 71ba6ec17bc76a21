using System.Globalization;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace OdeDsl.Modeling;

/// <summary>What generated code of models with vectors needs to keep them: made for that code, not for users.</summary>
public static class VectorStorage
{
    /// <summary>Makes a vector.</summary>
    /// <param name="length">Its length.</param>
    /// <param name="value">The value of all elements.</param>
    /// <returns>The vector.</returns>
    public static double[] Filled(int length, double value)
    {
        var vector = new double[length];
        Array.Fill(vector, value);
        return vector;
    }

    /// <summary>Makes a vector with rows and columns.</summary>
    /// <param name="rows">The number of rows.</param>
    /// <param name="columns">The number of columns.</param>
    /// <param name="value">The value of all elements.</param>
    /// <returns>The vector.</returns>
    public static double[,] Filled(int rows, int columns, double value)
    {
        var vector = new double[rows, columns];
        Elements(vector).Fill(value);
        return vector;
    }

    /// <summary>The elements one after another.</summary>
    /// <param name="vector">A vector.</param>
    /// <returns>Its elements, not a copy.</returns>
    public static Span<double> Elements(double[] vector) => vector;

    /// <summary>The elements one after another, row by row.</summary>
    /// <param name="vector">A vector with rows and columns.</param>
    /// <returns>Its elements, not a copy.</returns>
    public static Span<double> Elements(double[,] vector)
    {
        ArgumentNullException.ThrowIfNull(vector);
        return MemoryMarshal.CreateSpan(ref Unsafe.As<byte, double>(ref MemoryMarshal.GetArrayDataReference(vector)), vector.Length);
    }

    /// <summary>Checks the length of an assigned vector.</summary>
    /// <param name="name">The property's name.</param>
    /// <param name="vector">The vector.</param>
    /// <param name="length">The length it must have.</param>
    /// <returns>The vector.</returns>
    /// <exception cref="ArgumentException">It has another length.</exception>
    public static double[] RequireShape(string name, double[] vector, int length)
    {
        ArgumentNullException.ThrowIfNull(vector);
        if (vector.Length == length) return vector;
        throw new ArgumentException(string.Create(
            CultureInfo.InvariantCulture,
            $"{name} of this model has {length} elements, but {vector.Length} were given; lengths are set first, and when the model is made."));
    }

    /// <summary>Checks the rows and columns of an assigned vector.</summary>
    /// <param name="name">The property's name.</param>
    /// <param name="vector">The vector.</param>
    /// <param name="rows">The number of rows it must have.</param>
    /// <param name="columns">The number of columns it must have.</param>
    /// <returns>The vector.</returns>
    /// <exception cref="ArgumentException">It has others.</exception>
    public static double[,] RequireShape(string name, double[,] vector, int rows, int columns)
    {
        ArgumentNullException.ThrowIfNull(vector);
        if (vector.GetLength(0) == rows && vector.GetLength(1) == columns) return vector;
        throw new ArgumentException(string.Create(
            CultureInfo.InvariantCulture,
            $"{name} of this model has {rows} rows and {columns} columns, but {vector.GetLength(0)} and {vector.GetLength(1)} were given; lengths are set first, and when the model is made."));
    }

    /// <summary>Checks a length as it is set.</summary>
    /// <param name="name">The parameter's name.</param>
    /// <param name="value">The length.</param>
    /// <param name="minimum">The least length that the equations can work with.</param>
    /// <returns>The length.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The length is smaller.</exception>
    public static int RequireLength(string name, int value, int minimum)
    {
        if (value >= minimum) return value;
        throw new ArgumentOutOfRangeException(name, value, $"{name} must be at least {minimum}, because the equations treat so many elements apart.");
    }

    /// <summary>Checks a length in a vector of parameters.</summary>
    /// <param name="name">The parameter's name.</param>
    /// <param name="value">The length.</param>
    /// <param name="minimum">The least length that the equations can work with.</param>
    /// <exception cref="ArgumentOutOfRangeException">The length is smaller, or no whole number.</exception>
    public static void RequireLength(string name, double value, int minimum)
    {
        if (value != Math.Floor(value) || value > int.MaxValue)
            throw new ArgumentOutOfRangeException(name, value, $"{name} must be a whole number, because lengths of vectors depend on it.");
        if (!(value >= minimum)) RequireLength(name, (int)Math.Max(value, int.MinValue), minimum);
    }

    /// <summary>Makes sure that no vector exists yet when its length is set.</summary>
    /// <param name="length">The length's name.</param>
    /// <param name="name">The vector's name.</param>
    /// <param name="vector">The vector.</param>
    /// <exception cref="InvalidOperationException">It exists.</exception>
    public static void RequireUnset(string length, string name, Array? vector)
    {
        if (vector is not null) throw new InvalidOperationException($"{length} is the length of {name}: set it before {name}.");
    }

    /// <summary>Makes sure that a parameter that is fixed when the model is made stays as it is.</summary>
    /// <param name="name">The parameter's name.</param>
    /// <param name="value">Its value.</param>
    /// <param name="wanted">The value it would be set to.</param>
    /// <exception cref="ArgumentException">They differ.</exception>
    public static void RequireSame(string name, int value, double wanted)
    {
        if (value != wanted) throw new ArgumentException($"{name} is fixed at {value} when the model is made; make another model instead.");
    }
}
