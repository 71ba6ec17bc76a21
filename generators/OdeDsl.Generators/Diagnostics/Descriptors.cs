using Microsoft.CodeAnalysis;

namespace OdeDsl.Generators.Diagnostics;

/// <summary>
/// Every problem the generator reports, in one table. A number is never used again; each has a page in docs/diagnostics.
/// Arguments are texts, so that a message never depends on the culture.
/// </summary>
internal static partial class Descriptors
{
    /// <summary>The category of all problems.</summary>
    public const string Category = "OdeDsl";

    private const string Help = "https://odedsl.example/diagnostics/";

    // The generator and the model class.

    public static readonly DiagnosticDescriptor GeneratorFailed = new(
        "ODE0001", "The generator failed",
        "The generator failed on '{0}': {1}. This is a fault of OdeDsl; please report it together with the model.",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0001");

    public static readonly DiagnosticDescriptor ModelNotPartial = new(
        "ODE0002", "A model class must be partial",
        "Model class '{0}' is not partial; add 'partial' to its declaration",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0002");

    public static readonly DiagnosticDescriptor ContainerNotPartial = new(
        "ODE0003", "A type around a model must be partial",
        "'{0}' contains the model '{1}' but is not partial; add 'partial' to its declaration",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0003");

    public static readonly DiagnosticDescriptor DuplicateModelAttribute = new(
        "ODE0004", "A model is marked twice",
        "[OdeModel] stands on several parts of '{0}'; keep the first and remove this one",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0004");

    public static readonly DiagnosticDescriptor FileLocalModel = new(
        "ODE0005", "A model must not be file-local",
        "'{0}' is file-local, so that generated code cannot add to it; remove 'file'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0005");

    public static readonly DiagnosticDescriptor StaticModel = new(
        "ODE0006", "A model must not be static",
        "Model '{0}' is static, but a model is an object with its own states and parameters; remove 'static'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0006");

    public static readonly DiagnosticDescriptor AbstractModel = new(
        "ODE0007", "A model must not be abstract",
        "Model '{0}' is abstract, so that its equations cannot be known; mark the class that can be created instead",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0007");

    public static readonly DiagnosticDescriptor InheritedModelMember = new(
        "ODE0008", "States, parameters, rates and observables must be declared in the model itself",
        "Model '{0}' inherits '{1}', which is marked with [{2}]; declare it in '{0}' itself",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0008");

    public static readonly DiagnosticDescriptor ModelWithoutStates = new(
        "ODE0009", "A model needs a state",
        "Model '{0}' has no state; mark a partial property of type double with [State]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0009");

    public static readonly DiagnosticDescriptor LanguageTooOld = new(
        "ODE0010", "Models need C# 13",
        "Model '{0}' needs partial properties, hence C# 13 or later, but is compiled as C# {1}; raise <LangVersion>",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0010");

    public static readonly DiagnosticDescriptor ReservedName = new(
        "ODE0011", "The name of the generated equations is taken",
        "'{0}' is the name of the struct that is generated into model '{1}'; rename this one",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0011");

    public static readonly DiagnosticDescriptor AttributeOutsideModel = new(
        "ODE0012", "A modelling attribute has no effect outside a model",
        "[{0}] on '{1}' has no effect because '{2}' is not a model; mark the class with [OdeModel]",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0012");

    // States and parameters.

    public static readonly DiagnosticDescriptor PropertyNotPartial = new(
        "ODE0020", "A state or parameter must be partial",
        "{0} '{1}' is not partial, so that its storage cannot be generated; write 'partial' before its type",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0020");

    public static readonly DiagnosticDescriptor PropertyNotDouble = new(
        "ODE0021", "A state or parameter must be a double",
        "{0} '{1}' has type '{2}'; make it a double",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0021");

    public static readonly DiagnosticDescriptor PropertyStatic = new(
        "ODE0022", "A state or parameter must not be static",
        "{0} '{1}' is static, but each model has its own; remove 'static'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0022");

    public static readonly DiagnosticDescriptor PropertyWithoutGetter = new(
        "ODE0023", "A state or parameter must have a getter",
        "{0} '{1}' has no getter; add 'get;'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0023");

    public static readonly DiagnosticDescriptor PropertyIsIndexer = new(
        "ODE0024", "A state or parameter must not be an indexer",
        "{0} '{1}' takes arguments; declare one property for each number",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0024");

    public static readonly DiagnosticDescriptor PropertyImplemented = new(
        "ODE0025", "A state or parameter must be left to the generator",
        "{0} '{1}' already has an implementation; leave its accessors without a body so that the generator can write them",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0025");

    public static readonly DiagnosticDescriptor TwoRoles = new(
        "ODE0026", "A member has two roles",
        "'{0}' is marked with [{1}] and with [{2}]; keep one of them",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0026");

    public static readonly DiagnosticDescriptor AngleWithoutState = new(
        "ODE0027", "Only a state can be an angle",
        "'{0}' is marked with [Angle] but is not a state; add [State] or remove [Angle]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0027");

    public static readonly DiagnosticDescriptor AnglePeriodInvalid = new(
        "ODE0028", "The period of an angle must be positive and finite",
        "Angle '{0}' has the period {1}; give a positive, finite number",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0028");

    public static readonly DiagnosticDescriptor ValueNotFinite = new(
        "ODE0029", "A starting value must be finite",
        "{0} '{1}' starts at {2}; give a finite number",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0029");

    public static readonly DiagnosticDescriptor BoundNotANumber = new(
        "ODE0030", "A bound must be a number",
        "Bound '{0}' of '{1}' is NaN; give a number, or leave it out for no bound",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0030");

    public static readonly DiagnosticDescriptor BoundsCrossed = new(
        "ODE0031", "The lower bound must be less than the upper bound",
        "'{0}' has the bounds {1} and {2}; make Lower less than Upper",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0031");

    public static readonly DiagnosticDescriptor ValueOutsideBounds = new(
        "ODE0032", "A starting value must lie within its bounds",
        "{0} '{1}' starts at {2}, outside its bounds {3} and {4}; change the value or the bounds",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0032");

    public static readonly DiagnosticDescriptor AttributeNotReadable = new(
        "ODE0033", "The numbers of an attribute cannot be read",
        "[{0}] on '{1}' cannot be read; give it constants that stand in this project's own code",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0033");

    public static readonly DiagnosticDescriptor PropertyOverridable = new(
        "ODE0034", "A state or parameter must not be virtual",
        "{0} '{1}' is '{2}', so that reading it need not give the stored number; remove '{2}'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0034");

    // Rates and observables.

    public static readonly DiagnosticDescriptor RateOfUnknownMember = new(
        "ODE0040", "A rate must name a state",
        "'{0}' is the rate of '{1}', but model '{2}' has no member of that name; write nameof with one of its states",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0040");

    public static readonly DiagnosticDescriptor RateOfOtherMember = new(
        "ODE0041", "A rate must name a state",
        "'{0}' is the rate of '{1}', which is not a state; mark '{1}' with [State] or name a state",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0041");

    public static readonly DiagnosticDescriptor SecondRate = new(
        "ODE0042", "A state must have one rate",
        "State '{0}' has the rate '{1}' already; merge '{2}' into it",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0042");

    public static readonly DiagnosticDescriptor MissingRate = new(
        "ODE0043", "A state must have a rate",
        "State '{0}' has no rate; mark the member that computes its time derivative with [Rate(nameof({0}))]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0043");

    public static readonly DiagnosticDescriptor EquationNotDouble = new(
        "ODE0044", "A rate or observable must be a double",
        "{0} '{1}' has type '{2}'; make it a double",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0044");

    public static readonly DiagnosticDescriptor EquationArguments = new(
        "ODE0045", "A rate or observable may only take the time",
        "{0} '{1}' may take one argument 'double time' and no other",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0045");

    public static readonly DiagnosticDescriptor EquationStatic = new(
        "ODE0046", "A rate or observable must not be static",
        "{0} '{1}' is static, but each model has its own; remove 'static'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0046");

    public static readonly DiagnosticDescriptor EquationGeneric = new(
        "ODE0047", "A rate or observable must not be generic",
        "{0} '{1}' is generic, so that its equation is not known; remove the type parameters",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0047");

    public static readonly DiagnosticDescriptor EquationWithoutBody = new(
        "ODE0048", "A rate or observable must have a body",
        "{0} '{1}' has no body that can be read; write its equation as an expression or a block",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0048");

    public static readonly DiagnosticDescriptor MemberOverridable = new(
        "ODE0049", "An equation must not depend on an overridable member",
        "'{0}' can be overridden in a class derived from '{1}', so that its value is not known; seal the class or the member",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0049");

    public static readonly DiagnosticDescriptor DuplicateObservable = new(
        "ODE0050", "Observables must have different names",
        "Observable '{0}' is declared twice; rename one of the two",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0050");

    // Equations.

    public static readonly DiagnosticDescriptor StatementNotSupported = new(
        "ODE0060", "A statement is not supported in equations",
        "{0} cannot be part of an equation; {1}",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0060");

    public static readonly DiagnosticDescriptor ExpressionNotSupported = new(
        "ODE0061", "An expression is not supported in equations",
        "{0} cannot be part of an equation; {1}",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0061");

    public static readonly DiagnosticDescriptor PatternNotSupported = new(
        "ODE0062", "A pattern is not supported in equations",
        "{0} cannot be part of an equation; compare numbers with constants, relations, 'and', 'or' and 'not'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0062");

    public static readonly DiagnosticDescriptor SourceUnknown = new(
        "ODE0063", "A member without source cannot be part of an equation",
        "The source of '{0}' is not in this project, so that it cannot be differentiated; write the formula in the model",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0063");

    public static readonly DiagnosticDescriptor FunctionNotSupported = new(
        "ODE0064", "A function is not supported in equations",
        "'{0}' cannot be part of an equation; {1}",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0064");

    public static readonly DiagnosticDescriptor MutableMember = new(
        "ODE0065", "An equation must not read a variable that is neither a state nor a parameter",
        "'{0}' can be changed at any time; make it a [Parameter], a [State], const or static readonly",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0065");

    public static readonly DiagnosticDescriptor AssignmentOutside = new(
        "ODE0066", "An equation must not change anything outside itself",
        "'{0}' must not be assigned here; an equation may only assign its own local variables",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0066");

    public static readonly DiagnosticDescriptor Recursion = new(
        "ODE0067", "An equation must not depend on itself",
        "'{0}' depends on itself: {1}; write it without recursion",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0067");

    public static readonly DiagnosticDescriptor ConstructorSetsValue = new(
        "ODE0068", "The value of a read-only member is not known",
        "'{0}' is set in a constructor, so that its value is not known; make it a [Parameter], const or static readonly",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0068");

    public static readonly DiagnosticDescriptor WholeNumberUnknown = new(
        "ODE0069", "Only constants and choices between them can be whole numbers",
        "'{0}' of type '{1}' is not known when compiling; stay with double, and round with Math.Floor, Math.Truncate or Math.Round",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0069");

    public static readonly DiagnosticDescriptor NotDoublePrecision = new(
        "ODE0070", "Equations compute in double precision",
        "'{0}' computes in '{1}', which rounds differently from double; use double throughout",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0070");

    public static readonly DiagnosticDescriptor UserDefinedOperator = new(
        "ODE0071", "User-defined operators are not supported in equations",
        "'{0}' uses the operator '{1}'; write the formula with doubles",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0071");

    public static readonly DiagnosticDescriptor ArgumentByReference = new(
        "ODE0072", "Arguments must be passed by value",
        "Argument '{0}' of '{1}' is passed by '{2}'; pass it by value and return the result",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0072");

    public static readonly DiagnosticDescriptor NotAFunction = new(
        "ODE0073", "An equation must give the same value each time",
        "'{0}' changes from call to call; use a [Parameter], or the argument 'double time' of the rate",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0073");

    public static readonly DiagnosticDescriptor NotResolved = new(
        "ODE0074", "A name or an expression cannot be resolved",
        "'{0}' cannot be resolved; correct it, or write it by hand if another generator makes it, which is not visible here",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0074");

    public static readonly DiagnosticDescriptor EquationTooDeep = new(
        "ODE0075", "An equation is nested too deeply",
        "The equation of '{0}' is nested too deeply to be read; split it into several members",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0075");

    public static readonly DiagnosticDescriptor WholeNumberFault = new(
        "ODE0076", "A whole-number operation fails",
        "'{0}' fails: {1}; use doubles, for example by writing 2.0 for 2",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0076");

    public static readonly DiagnosticDescriptor OtherObject = new(
        "ODE0077", "An equation must not read other objects",
        "'{0}' belongs to an object other than the model; copy the number into a [Parameter]",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0077");

    public static readonly DiagnosticDescriptor StaticOrder = new(
        "ODE0078", "A static member is read before it is set",
        "'{0}' is read while '{1}' is being set, before '{0}' has its value; declare '{0}' first, in the same file",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0078");

    public static readonly DiagnosticDescriptor TooManyCases = new(
        "ODE0079", "A whole number depends on too many conditions",
        "'{0}' can take more than {1} combinations of values; use double",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0079");

    public static readonly DiagnosticDescriptor SwitchWithoutMatch = new(
        "ODE0080", "A switch expression must have a value for every input",
        "This switch has no arm for some inputs; add an arm '_ =>'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0080");

    // Tables.

    public static readonly DiagnosticDescriptor TableNotFixed = new(
        "ODE0081", "A table must be static and fixed",
        "Table '{0}' must be a static read-only field, or a static property with 'get' only and an initializer, of type OdeDsl.Table",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0081");

    public static readonly DiagnosticDescriptor TableNotMarked = new(
        "ODE0082", "A table must be marked",
        "'{0}' is a table without [Table]; mark it, so that its knots and units belong to the model",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0082");

    public static readonly DiagnosticDescriptor TableNotAccessible = new(
        "ODE0083", "A table must be within reach of the model",
        "Table '{0}' is read through a helper, but '{1}' itself cannot reach it; make it internal",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0083");

    public static readonly DiagnosticDescriptor TableMemberNotSupported = new(
        "ODE0084", "Equations read tables by At",
        "'{0}' uses '{1}' of a table; an equation reads a table only by 'At(x)'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0084");

    // Advice: models that work, and could be better.

    public static readonly DiagnosticDescriptor UnreadState = new(
        "ODE0120", "A state is never read",
        "No rate and no observable reads state '{0}'; remove it, or show it as an observable if it only adds something up",
        Category, DiagnosticSeverity.Info, isEnabledByDefault: true, helpLinkUri: Help + "ODE0120");

    public static readonly DiagnosticDescriptor UnusedParameter = new(
        "ODE0121", "A parameter has no effect",
        "Nothing in model '{1}' reads parameter '{0}', so that setting it changes nothing; use it or remove it",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0121");

    public static readonly DiagnosticDescriptor VanishingDivisor = new(
        "ODE0122", "A divisor can be zero within the bounds of the states",
        "Divisor '{0}' is zero somewhere within the bounds of {1}; tighten the bounds, or write an equation that stays finite there",
        Category, DiagnosticSeverity.Info, isEnabledByDefault: true, helpLinkUri: Help + "ODE0122");

    public static readonly DiagnosticDescriptor InexactDivision = new(
        "ODE0123", "A division of whole numbers drops its remainder",
        "'{0}' is {1} because C# divides whole numbers without remainder; write one of them with a decimal point",
        Category, DiagnosticSeverity.Warning, isEnabledByDefault: true, helpLinkUri: Help + "ODE0123");

    public static readonly DiagnosticDescriptor ExactComparison = new(
        "ODE0124", "Moving numbers are compared for equality",
        "'{0}' holds at single instants, which a motion passes without noticing; compare with < or >",
        Category, DiagnosticSeverity.Info, isEnabledByDefault: true, helpLinkUri: Help + "ODE0124");

    public static readonly DiagnosticDescriptor JumpInEquation = new(
        "ODE0125", "An equation jumps",
        "'{1}' jumps where '{0}' changes, at each crossing and in both directions; if it stands for something that happens once or stays, write an [Event] that sets a [Mode]",
        Category, DiagnosticSeverity.Info, isEnabledByDefault: true, helpLinkUri: Help + "ODE0125");

    public static readonly DiagnosticDescriptor HelperNotStatic = new(
        "ODE0126", "A helper can be static",
        "Helper '{0}' uses neither states nor parameters; make it static so that this can be seen",
        Category, DiagnosticSeverity.Info, isEnabledByDefault: true, helpLinkUri: Help + "ODE0126");

    // Modes.

    public static readonly DiagnosticDescriptor ModeType = new(
        "ODE0085", "A mode must be a condition, a whole number or a number",
        "Mode '{0}' is of type '{1}'; use bool, int, double, or an enumeration over int or a smaller type",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0085");

    public static readonly DiagnosticDescriptor ModeInitial = new(
        "ODE0086", "A mode must start with a value of its type",
        "The initial value of mode '{0}' is not a constant of type '{1}'; give one as the attribute's argument",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0086");

    public static readonly DiagnosticDescriptor ModeRange = new(
        "ODE0087", "A mode can only have a few values",
        "Mode '{0}' must start with one of its values, of which there can be 1 to {1}; set 'Lower' and 'Upper' of the attribute, or choose another initial value",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0087");

    // Events.

    public static readonly DiagnosticDescriptor EventGuard = new(
        "ODE0090", "An event must name a guard",
        "Event '{0}' names '{1}', but its guard must be a property or method of the model with a body, of type double or bool, that takes nothing or 'double time'",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0090");

    public static readonly DiagnosticDescriptor EventAction = new(
        "ODE0091", "The action of an event must be a plain method",
        "Action '{0}' of an event must be an instance method with a body that returns nothing, takes nothing or 'double time', and is neither generic nor overridable",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0091");

    public static readonly DiagnosticDescriptor EventAssignment = new(
        "ODE0092", "An action sets states and modes only",
        "'{0}' is not a state or mode that the action '{1}' itself may set; set states and modes of the model, in the action's own body",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0092");

    public static readonly DiagnosticDescriptor ModeValueOutside = new(
        "ODE0093", "An action must not set a mode to a value outside its range",
        "Action '{0}' can set mode '{1}' to {2}, which is not one of its values; widen 'Lower' and 'Upper', or use Math.Clamp",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0093");

    public static readonly DiagnosticDescriptor VectorsWithInputs = new(
        "ODE0094", "A model with vectors cannot have inputs, modes or events yet",
        "Model '{0}' has vectors, and inputs, modes or events as well; declare inputs as parameters, and leave modes and events out",
        Category, DiagnosticSeverity.Error, isEnabledByDefault: true, helpLinkUri: Help + "ODE0094");
}
