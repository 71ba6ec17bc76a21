using System.Collections.Generic;
using System.Collections.Immutable;
using System.Linq;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Threading;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <summary>
/// Runs the bodies of a model's members on expressions instead of numbers. What is read is the compiler's <em>bound</em> operations,
/// so that conversions, integer division, constants and overloads mean what C# means.
/// </summary>
/// <remarks>
/// Branches are followed on both sides and joined by a conditional expression. Members of the model and static methods with source in
/// the compilation are run in place, once for each list of arguments. What is not understood is reported where it stands, and stands
/// for <see cref="UnknownValue"/> from there on.
/// </remarks>
internal sealed partial class BodyReader
{
    private static readonly ImmutableDictionary<ISymbol, Value> NoVariables =
        ImmutableDictionary.Create<ISymbol, Value>(SymbolEqualityComparer.Default);

    private readonly Compilation _compilation;
    private readonly VectorTables _vectors;
    private readonly ExpressionGraph _graph;
    private readonly Conditions _conditions;
    private readonly Problems _problems;
    private readonly CancellationToken _cancellation;

    private readonly Dictionary<CallKey, Value> _known = [];
    private readonly List<CallKey> _knownInOrder = [];
    private readonly List<(ISymbol Member, ModelScope Scope)> _active = [];
    private ModelScope _scope;
    private ModelScope _receiver;
    private Flow _flow;
    private IOperation? _current;

    /// <param name="model">The model with its submodels and the nodes of their numbers.</param>
    /// <param name="vectors">Vectors and lengths.</param>
    public BodyReader(
        ModelScope model,
        Compilation compilation,
        VectorTables vectors,
        ExpressionGraph graph,
        Problems problems,
        CancellationToken cancellation)
    {
        _scope = _receiver = model;
        _compilation = compilation;
        _vectors = vectors;
        _graph = graph;
        _conditions = new(graph);
        _problems = problems;
        _cancellation = cancellation;
        _flow = Start(NoVariables);
    }

    /// <summary>The user's text of conditions and of functions with a kink, by node.</summary>
    public Dictionary<int, string> ConditionTexts { get; } = [];

    /// <summary>Reads a rate or an observable.</summary>
    /// <param name="scope">The model or submodel it belongs to.</param>
    /// <returns>The node of its value, or null with a problem reported.</returns>
    public int? Read(ModelScope scope, ISymbol member) => Read(scope, member, []);

    /// <summary>Reads the rate of an element of a vector.</summary>
    /// <param name="scope">The model it belongs to.</param>
    /// <param name="indices">The element's indices, in the order of the member's whole-number arguments.</param>
    public int? Read(ModelScope scope, ISymbol member, IReadOnlyList<Affine> indices)
    {
        _scope = scope;
        Queue<Affine> left = new(indices);
        Value[] arguments = [.. (member is IMethodSymbol method ? method.Parameters : ImmutableArray<IParameterSymbol>.Empty).Select(parameter =>
            parameter.Type.SpecialType == SpecialType.System_Double ? new NumberValue(_graph.Leaf(Operator.Time)) : WholeOf(left.Dequeue()))];
        try
        {
            return Call(member, arguments) is NumberValue number ? number.Node : null;
        }
        catch (System.InsufficientExecutionStackException)
        {
            _problems.Report(Descriptors.EquationTooDeep, member.Locations[0], member.Name);
            return null;
        }
    }

    /// <summary>How much is known now, to go back to.</summary>
    public (int Problems, int Known) Mark => (_problems.Found.Count, _knownInOrder.Count);

    /// <summary>Forgets what was read since a mark, because the range of an index has been split since.</summary>
    public void GoBackTo((int Problems, int Known) mark)
    {
        _problems.ForgetSince(mark.Problems);
        foreach (CallKey key in _knownInOrder.Skip(mark.Known)) _known.Remove(key);
        _knownInOrder.RemoveRange(mark.Known, _knownInOrder.Count - mark.Known);
    }

    private Value Know(CallKey key, Value value)
    {
        _known.Add(key, value);
        _knownInOrder.Add(key);
        return value;
    }

    private Flow Start(ImmutableDictionary<ISymbol, Value> variables) =>
        new(variables, _conditions.False, null, _conditions.False, NoVariables, _conditions.False);

    private Value Evaluate(IOperation operation)
    {
        _cancellation.ThrowIfCancellationRequested();
        RuntimeHelpers.EnsureSufficientExecutionStack();
        _current = operation;
        if (operation.ConstantValue is { HasValue: true, Value: var constant }) return Constant(constant);
        return operation switch
        {
            ILocalReferenceOperation local => Variable(local.Local, operation),
            IParameterReferenceOperation parameter => Variable(parameter.Parameter, operation),
            IInstanceReferenceOperation { ReferenceKind: InstanceReferenceKind.ContainingTypeInstance } => new ModelValue(_scope),
            IArrayElementReferenceOperation element => Element(element),
            IFieldReferenceOperation field => Field(field),
            IPropertyReferenceOperation property => Property(property),
            IInvocationOperation invocation => Invocation(invocation),
            IBinaryOperation binary => Binary(binary),
            IUnaryOperation unary => Unary(unary),
            IConversionOperation conversion => Conversion(conversion),
            IConditionalOperation { WhenFalse: not null } conditional => Conditional(conditional),
            ISwitchExpressionOperation choice => SwitchExpression(choice),
            IIsPatternOperation test => new ConditionValue(Match(test.Pattern, Evaluate(test.Value), UserText.Of(test.Value.Syntax))),
            ISimpleAssignmentOperation assignment => Assignment(assignment),
            ICompoundAssignmentOperation assignment => CompoundAssignment(assignment),
            IIncrementOrDecrementOperation step => Step(step),
            IInvalidOperation => Unresolved(operation),
            _ => Unsupported(operation),
        };
    }

    private Value Constant(object? constant) => constant switch
    {
        double number => new NumberValue(_graph.Constant(number)),
        bool condition => new ConditionValue(_graph.Constant(condition)),
        not null when WholeNumbers.Read(constant) is { } whole => new WholeValue(new ChoiceLeaf<BigInteger>(whole)),
        _ => new LiteralValue(constant),
    };

    private Value Variable(ISymbol variable, IOperation operation)
    {
        if (_flow.Variables.TryGetValue(variable, out Value? value)) return value;
        if (_problems.Found.Count > 0) return UnknownValue.Instance; // It would have been set by what is reported already.
        return variable.ContainingSymbol is IMethodSymbol { MethodKind: MethodKind.Constructor }
            ? Problem(Descriptors.ConstructorSetsValue, operation, variable.Name)
            : Unresolved(operation);
    }

    private Value Conditional(IConditionalOperation operation)
    {
        if (operation.Type is IErrorTypeSymbol) return Unresolved(operation);
        int condition = Condition(operation.Condition);
        _current = operation;
        return Fork(condition, () => Evaluate(operation.WhenTrue), () => Evaluate(operation.WhenFalse!));
    }

    /// <summary>The node of a condition. An unknown one becomes one that nothing decides, so that both its sides are still read.</summary>
    private int Condition(IOperation operation) => ConditionOf(Evaluate(operation));

    private int ConditionOf(Value value) => value is ConditionValue condition ? condition.Node : Undecided;

    /// <summary>Stands for a condition with a problem. It never reaches a model, because models with problems keep no equation.</summary>
    private int Undecided => _graph.Binary(Operator.Less, _graph.Leaf(Operator.Time), _graph.Constant(double.NaN));

    private int Node(Value value) => value switch
    {
        NumberValue number => number.Node,
        WholeValue { Number: { } number } => number,
        IndexValue index => NumberOf(index.Number),
        WholeValue whole => whole.Choice.Fold(leaf => _graph.Constant(WholeNumbers.ToDouble(leaf)), _conditions.ChooseNumber),
        _ => _graph.Constant(double.NaN),
    };

    private UnknownValue Problem(DiagnosticDescriptor descriptor, IOperation operation, params object[] arguments) =>
        Problem(descriptor, operation.Syntax.GetLocation(), arguments);

    private UnknownValue Problem(DiagnosticDescriptor descriptor, Location place, params object[] arguments)
    {
        _problems.Report(descriptor, place, arguments);
        return UnknownValue.Instance;
    }

    private UnknownValue Unresolved(IOperation operation)
    {
        if (UsesUnknown(operation)) return UnknownValue.Instance;
        IOperation smallest = operation.DescendantsAndSelf().LastOrDefault(static inner => inner is IInvalidOperation) ?? operation;
        return Problem(Descriptors.NotResolved, smallest, UserText.Of(smallest.Syntax));
    }

    private UnknownValue Unsupported(IOperation operation)
    {
        if (UsesUnknown(operation)) return UnknownValue.Instance;
        if (operation.Type is IErrorTypeSymbol) return Unresolved(operation);
        (string what, string instead) = Unreadable.Describe(operation);
        return Problem(Descriptors.ExpressionNotSupported, operation, what, instead);
    }

    /// <summary>Whether the operation fails only because of a variable whose own problem is told already.</summary>
    private bool UsesUnknown(IOperation operation) => operation.DescendantsAndSelf().OfType<ILocalReferenceOperation>()
        .Any(local => _flow.Variables.TryGetValue(local.Local, out Value? value) && value is UnknownValue);

    private sealed record CallKey(ISymbol Member, ModelScope Scope, EquatableArray<Value> Arguments);
}
