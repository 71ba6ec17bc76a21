using System;
using System.Collections.Generic;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// One of finitely many values, chosen by conditions. Operations act on the values, so that integer arithmetic is exactly that of
/// C#, division, overflow and all.
/// </summary>
internal abstract record Choice<T>
{
    /// <summary>How many values there are to choose from, counted with repetition.</summary>
    public abstract int Count { get; }

    public abstract TResult Fold<TResult>(Func<T, TResult> leaf, Func<int, TResult, TResult, TResult> branch);

    public Choice<TResult> Select<TResult>(Func<T, TResult> operation) =>
        Fold<Choice<TResult>>(value => new ChoiceLeaf<TResult>(operation(value)), Choice.Between);

    /// <summary>Joins two choices, case by case; a condition that both depend on is decided once.</summary>
    public Choice<TResult> Combine<TOther, TResult>(Choice<TOther> other, Func<T, TOther, TResult> operation) => this switch
    {
        ChoiceBranch<T> branch => Choice.Between(
            branch.Condition,
            branch.WhenTrue.Combine(other.Knowing(branch.Condition, true), operation),
            branch.WhenFalse.Combine(other.Knowing(branch.Condition, false), operation)),
        ChoiceLeaf<T> leaf => other.Select(value => operation(leaf.Value, value)),
        _ => throw new InvalidOperationException(),
    };

    private Choice<T> Knowing(int condition, bool holds) => this is not ChoiceBranch<T> branch
        ? this
        : branch.Condition == condition
            ? (holds ? branch.WhenTrue : branch.WhenFalse).Knowing(condition, holds)
            : Choice.Between(branch.Condition, branch.WhenTrue.Knowing(condition, holds), branch.WhenFalse.Knowing(condition, holds));
}

internal sealed record ChoiceLeaf<T>(T Value) : Choice<T>
{
    public override int Count => 1;

    public override TResult Fold<TResult>(Func<T, TResult> leaf, Func<int, TResult, TResult, TResult> branch) => leaf(Value);
}

internal sealed record ChoiceBranch<T>(int Condition, Choice<T> WhenTrue, Choice<T> WhenFalse) : Choice<T>
{
    public override int Count { get; } = WhenTrue.Count + WhenFalse.Count;

    public override TResult Fold<TResult>(Func<T, TResult> leaf, Func<int, TResult, TResult, TResult> branch) =>
        branch(Condition, WhenTrue.Fold(leaf, branch), WhenFalse.Fold(leaf, branch));
}

internal static class Choice
{
    /// <summary>The most values a choice may have; more would mean a formula nobody can read.</summary>
    public const int MaximumCount = 64;

    /// <param name="condition">The node of the condition.</param>
    public static Choice<T> Between<T>(int condition, Choice<T> whenTrue, Choice<T> whenFalse) =>
        EqualityComparer<Choice<T>>.Default.Equals(whenTrue, whenFalse) ? whenTrue : new ChoiceBranch<T>(condition, whenTrue, whenFalse);
}
