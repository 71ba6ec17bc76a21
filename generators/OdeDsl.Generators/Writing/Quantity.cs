using System;
using System.Collections.Generic;
using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Writing;

/// <summary>One member of the contract to print: expressions and the places of a vector that they go to.</summary>
/// <param name="Method">The member's name.</param>
/// <param name="Inputs">The vectors it takes, in order.</param>
/// <param name="Target">The vector that receives the results.</param>
/// <param name="Length">How many places of it belong to the results; those without a result receive zero.</param>
/// <param name="Graph">The graph of the expressions.</param>
/// <param name="Results">The results, places ascending.</param>
internal sealed record Quantity(
    string Method, IReadOnlyList<string> Inputs, string Target, int Length, ExpressionGraph Graph, IReadOnlyList<Result> Results)
{
    /// <summary>What its numbers are.</summary>
    public NumberKind Kind { get; init; } = NumberKind.Double;

    /// <summary>The name stem of the methods it is cut into when it is large: overloads differ in it.</summary>
    public string PartName => (Inputs.Contains("regime") && Method.StartsWith("Rates", StringComparison.Ordinal) ? "Locked" : "") + Method + "Part";
}

/// <summary>One result.</summary>
/// <param name="Node">The expression; a condition is delivered as 1 or 0.</param>
/// <param name="Place">Where it goes.</param>
/// <param name="Name">A wish for the name of the local that holds it.</param>
/// <param name="Comment">What to say above the lines that compute it, or the empty string.</param>
internal sealed record Result(int Node, int Place, string Name, string Comment);
