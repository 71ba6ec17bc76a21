using System.Collections;
using System.Runtime.CompilerServices;

namespace OdeDsl.Modeling;

/// <summary>
/// The descriptions of a model's states, parameters or switching functions, in the order of their vector. Those of vectors are made
/// when they are asked for, so that a million cells cost no more than one.
/// </summary>
/// <typeparam name="T">The kind of description.</typeparam>
[CollectionBuilder(typeof(DescriptionList), nameof(DescriptionList.Create))]
public sealed class DescriptionList<T> : IReadOnlyList<T>
    where T : class
{
    private readonly T[] scalars;
    private readonly (int End, Func<int, T> Describe)[] vectors;

    internal DescriptionList(T[] scalars, (int Count, Func<int, T> Describe)[] vectors)
    {
        this.scalars = scalars;
        this.vectors = new (int, Func<int, T>)[vectors.Length];
        int end = scalars.Length;
        for (int i = 0; i < vectors.Length; i++)
        {
            end += vectors[i].Count;
            this.vectors[i] = (end, vectors[i].Describe);
        }

        Length = end;
    }

    /// <summary>How many there are.</summary>
    public int Length { get; }

    /// <summary>How many there are that belong to no vector; they come first.</summary>
    public int ScalarCount => scalars.Length;

    int IReadOnlyCollection<T>.Count => Length;

    /// <summary>The description at a position of the vector.</summary>
    /// <param name="index">The position.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such position.</exception>
    public T this[int index]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfNegative(index);
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(index, Length);
            if (index < scalars.Length) return scalars[index];
            int start = scalars.Length;
            foreach ((int end, Func<int, T> describe) in vectors)
            {
                if (index < end) return describe(index - start);
                start = end;
            }

            throw new InvalidOperationException();
        }
    }

    /// <inheritdoc/>
    public IEnumerator<T> GetEnumerator()
    {
        for (int i = 0; i < Length; i++) yield return this[i];
    }

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();
}

/// <summary>Makes lists of descriptions.</summary>
public static class DescriptionList
{
    /// <summary>Makes a list without vectors, as a collection expression does.</summary>
    /// <typeparam name="T">The kind of description.</typeparam>
    /// <param name="items">The descriptions.</param>
    /// <returns>The list.</returns>
    public static DescriptionList<T> Create<T>(ReadOnlySpan<T> items)
        where T : class =>
        new(items.ToArray(), []);

    /// <summary>Makes a list in which vectors follow the single descriptions.</summary>
    /// <typeparam name="T">The kind of description.</typeparam>
    /// <param name="items">The single descriptions.</param>
    /// <param name="vectors">For each vector how many elements it has, and what describes one of them.</param>
    /// <returns>The list.</returns>
    public static DescriptionList<T> Create<T>(ReadOnlySpan<T> items, params (int Count, Func<int, T> Describe)[] vectors)
        where T : class =>
        new(items.ToArray(), vectors);
}
