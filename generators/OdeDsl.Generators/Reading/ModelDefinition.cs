using System.Linq;
using OdeDsl.Generators.Algebra;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// A model as read from the user's code: values only, no compiler object, so that two equal models compare equal and the pipeline
/// stops here when nothing that matters has changed.
/// </summary>
/// <remarks>
/// Duties of this type and all it holds: structural equality (arrays by <see cref="EquatableArray{T}"/>, numbers by their bits),
/// and no symbol, syntax node or location (they change at every edit and keep old compilations alive).
/// </remarks>
internal sealed record ModelDefinition(
    TypeChain Type,
    string Summary,
    EquatableArray<StateDefinition> States,
    EquatableArray<ParameterDefinition> Parameters,
    EquatableArray<ObservableDefinition> Observables,
    EquatableArray<Node> Nodes,
    EquatableArray<ConditionText> ConditionTexts,
    EquatableArray<string> TakenNames)
{
    /// <summary>The unit of time, or the empty string.</summary>
    public string TimeUnit { get; init; } = "";

    /// <summary>The modes; they stand behind the parameters in the same vector.</summary>
    public EquatableArray<ModeDefinition> Modes { get; init; } = EquatableArray<ModeDefinition>.Empty;

    /// <summary>The inputs; they stand behind the modes, and their slopes behind them.</summary>
    public EquatableArray<InputDefinition> Inputs { get; init; } = EquatableArray<InputDefinition>.Empty;

    /// <summary>The length of that vector.</summary>
    public int ConstantCount => Parameters.Count + Modes.Count + (2 * Inputs.Count);

    /// <summary>The events, in the order of declaration.</summary>
    public EquatableArray<EventDefinition> Events { get; init; } = EquatableArray<EventDefinition>.Empty;

    /// <summary>The submodels of the model itself. Their states and parameters stand behind the model's own, in this order.</summary>
    public EquatableArray<SubmodelDefinition> Submodels { get; init; } = EquatableArray<SubmodelDefinition>.Empty;

    /// <summary>How many states, the first ones, are the model's own; likewise parameters.</summary>
    public int OwnStateCount => States.Count - Submodels.Sum(static submodel => submodel.StateCount);

    public int OwnParameterCount => Parameters.Count - Submodels.Sum(static submodel => submodel.ParameterPlaces.Count(static place => place >= 0));

    /// <summary>The tables that the equations read; nodes name them by position.</summary>
    public EquatableArray<TableDefinition> Tables { get; init; } = EquatableArray<TableDefinition>.Empty;

    /// <summary>Vectors and lengths, or null for a model without any.</summary>
    public VectorPart? Vectors { get; init; }
}

/// <summary>Where the model class stands: enough to reopen it in a generated file.</summary>
/// <param name="Namespace">The namespace with keywords escaped, or the empty string.</param>
/// <param name="Types">The containing types from the outside in, the model class last.</param>
/// <param name="MetadataName">Namespace, containing types and arity: unique, used for the file name.</param>
internal sealed record TypeChain(string Namespace, EquatableArray<TypeLink> Types, string MetadataName);

/// <summary>One type declaration of the chain.</summary>
/// <param name="Keyword"><c>class</c>, <c>struct</c>, <c>record</c>, <c>record struct</c> or <c>interface</c>.</param>
/// <param name="Name">The name with keywords escaped.</param>
/// <param name="TypeParameters">As in <c>&lt;T&gt;</c>, or the empty string.</param>
internal sealed record TypeLink(string Keyword, string Name, string TypeParameters);

/// <summary>A state and its rate.</summary>
/// <param name="Property">The declared property.</param>
/// <param name="InitialBits">Bits of the initial value (likewise the bounds).</param>
/// <param name="AnglePeriodBits">Bits of the period if the state lives on a circle.</param>
/// <param name="Rate">The rate's node.</param>
/// <param name="RateText">The rate as the user wrote it.</param>
internal sealed record StateDefinition(
    PropertyDefinition Property,
    string Unit,
    long InitialBits,
    long LowerBits,
    long UpperBits,
    long? AnglePeriodBits,
    int Rate,
    string RateText);

/// <summary>A parameter.</summary>
internal sealed record ParameterDefinition(PropertyDefinition Property, string Unit, long ValueBits, long LowerBits, long UpperBits)
{
    /// <summary>Whether it is a whole number, which is fixed when a model is made.</summary>
    public bool IsWhole { get; init; }
}

/// <summary>A mode.</summary>
/// <param name="Kind">What its values are.</param>
internal sealed record ModeDefinition(PropertyDefinition Property, ModeKind Kind, long InitialBits);

/// <summary>The types of modes.</summary>
internal enum ModeKind
{
    Number,
    WholeNumber,
    Condition,
    Enumeration,
}

/// <summary>An event.</summary>
/// <param name="Name">The name of the action.</param>
/// <param name="Guard">The name of the guard.</param>
/// <param name="GuardText">The guard as the user wrote it.</param>
/// <param name="Text">The action as the user wrote it.</param>
/// <param name="Direction">The number of the direction.</param>
/// <param name="Value">The guard's node: a number, 1 or -1 for a condition.</param>
/// <param name="States">The nodes of the states that the action sets, or leaves.</param>
/// <param name="Modes">Likewise the modes.</param>
internal sealed record EventDefinition(
    string Name,
    string Summary,
    string Guard,
    string GuardText,
    string Text,
    int Direction,
    bool IsTerminal,
    bool IsCondition,
    int Value,
    EquatableArray<int> States,
    EquatableArray<int> Modes);

/// <summary>An input.</summary>
internal sealed record InputDefinition(PropertyDefinition Property, string Unit, long ValueBits);

/// <summary>An observable.</summary>
/// <param name="Name">The member's name, unescaped.</param>
internal sealed record ObservableDefinition(string Name, string Summary, string Unit, int Value, string Text);

/// <summary>A table.</summary>
/// <param name="Name">The member's name, unescaped.</param>
/// <param name="Access">The expression that reaches it from generated code.</param>
internal sealed record TableDefinition(string Name, string Unit, string ArgumentUnit, string Access);

/// <summary>What the generator needs to print the implementing part of a partial property.</summary>
/// <param name="Name">The name, unescaped.</param>
/// <param name="Modifiers">Accessibility and other modifiers to repeat, <c>partial</c> left out: for example <c>public</c>.</param>
/// <param name="Accessors">The accessors to implement, for example <c>get</c>, <c>private set</c>, <c>init</c>.</param>
internal sealed record PropertyDefinition(string Name, string Summary, string Modifiers, EquatableArray<string> Accessors)
{
    /// <summary>The type as written in C#.</summary>
    public string Type { get; init; } = "double";
}

/// <summary>The user's text of a condition or of a function with a kink, to name its switching function by.</summary>
/// <param name="Node">The node.</param>
/// <param name="Text">The text, white space folded.</param>
internal sealed record ConditionText(int Node, string Text);

/// <summary>A submodel of a model.</summary>
/// <param name="Name">The property's name, unescaped.</param>
/// <param name="TypeName">The submodel's class, fully qualified.</param>
/// <param name="Partial">The property's implementing part to print, or null where the compiler makes its storage.</param>
/// <param name="StateCount">The number of states of the submodel.</param>
/// <param name="ParameterPlaces">For each parameter of the submodel its place in the whole's vector; -1 where the whole gives it by an equation.</param>
internal sealed record SubmodelDefinition(
    string Name, string TypeName, PropertyDefinition? Partial, int StateCount, EquatableArray<int> ParameterPlaces);
