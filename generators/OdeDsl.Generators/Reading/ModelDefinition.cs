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
