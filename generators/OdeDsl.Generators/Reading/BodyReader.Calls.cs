using System.Collections.Generic;
using System.Collections.Immutable;
using System.Linq;
using System.Numerics;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Diagnostics;

namespace OdeDsl.Generators.Reading;

/// <content>Calls: functions of System.Math become operators, all others are run in place.</content>
internal sealed partial class BodyReader
{
    private Value Invocation(IInvocationOperation operation)
    {
        IMethodSymbol method = operation.TargetMethod;
        if (LengthOf(operation) is { } length) return length;
        if (MathFunctions.IsHome(method.ContainingType)) return MathCall(operation, method);
        if (TableReader.IsTable(method.ContainingType)) return TableCall(operation);
        if (method.MethodKind is not (MethodKind.Ordinary or MethodKind.LocalFunction)) return Unsupported(operation);
        bool isLocal = method.MethodKind == MethodKind.LocalFunction;
        if (!isLocal && !method.IsStatic && !BelongsToModel(operation.Instance, operation, method)) return UnknownValue.Instance;
        if (method.RefKind != RefKind.None) return Unsupported(operation);
        ModelScope receiver = isLocal || method.IsStatic ? _scope : _receiver;
        if (At(receiver, () => Reach(method, !operation.IsVirtual, operation)) is not IMethodSymbol reached) return UnknownValue.Instance;
        if (Bodies.Find(reached, _compilation, _cancellation) is null) return WithoutSource(operation, reached);
        return Arguments(operation, isLocal) is { } arguments ? At(receiver, () => Call(reached, arguments)) : UnknownValue.Instance;
    }

    /// <summary>The arguments in the order of the parameters, evaluated in the order of the text.</summary>
    private Value[]? Arguments(IInvocationOperation operation, bool isLocal)
    {
        Value[] values = new Value[operation.TargetMethod.Parameters.Length];
        foreach (IArgumentOperation argument in operation.Arguments)
        {
            IParameterSymbol parameter = argument.Parameter!;
            // A local function could change a variable that it also gets by reference.
            if (parameter.RefKind is RefKind.Ref or RefKind.Out || (isLocal && parameter.RefKind != RefKind.None))
            {
                string text = UserText.Of(argument.Value.Syntax);
                string way = parameter.RefKind.ToString().ToLowerInvariant();
                Problem(Descriptors.ArgumentByReference, argument, text, operation.TargetMethod.Name, way);
                return null;
            }

            values[parameter.Ordinal] = Evaluate(argument.Value);
        }

        _current = operation;
        return values;
    }

    /// <summary>Runs a member with source.</summary>
    private Value Call(ISymbol member, Value[] arguments)
    {
        ISymbol definition = ((member as IMethodSymbol)?.PartialImplementationPart ?? member).OriginalDefinition;
        if (_active.Any(active => active.Scope == _scope && SymbolEqualityComparer.Default.Equals(active.Member, definition))) return Recursion(definition);

        // The value of a local function depends on variables around it, and while static members are set their order matters.
        bool isReusable = definition is not IMethodSymbol { MethodKind: MethodKind.LocalFunction } && _initializing.Count == 0 && !IsInAction;
        CallKey key = new(member, _scope, new(arguments));
        if (isReusable && _known.TryGetValue(key, out Value? known)) return known;
        Value value = Run(definition, arguments);
        return isReusable ? Know(key, value) : value;
    }

    private UnknownValue Recursion(ISymbol definition)
    {
        int start = _active.FindIndex(active => active.Scope == _scope && SymbolEqualityComparer.Default.Equals(active.Member, definition));
        string cycle = string.Join(" → ", _active.Skip(start).Append((definition, _scope)).Select(static active => active.Item2.Path + active.Item1.Name));
        return Problem(Descriptors.Recursion, _current?.Syntax.GetLocation() ?? definition.Locations[0], definition.Name, cycle);
    }

    private Value Run(ISymbol definition, Value[] arguments)
    {
        SyntaxNode body = Bodies.Find(definition, _compilation, _cancellation)!;
        int problemsBefore = _problems.Found.Count;
        bool isLocal = definition is IMethodSymbol { MethodKind: MethodKind.LocalFunction };
        ImmutableDictionary<ISymbol, Value> variables = isLocal ? _flow.Variables : IsInAction ? SetSoFar() : NoVariables;
        if (definition is IMethodSymbol method)
        {
            variables = variables.SetItems(
                method.Parameters.Select(parameter => new KeyValuePair<ISymbol, Value>(parameter, arguments[parameter.Ordinal])));
        }

        Flow before = _flow;
        _active.Add((definition, _scope));
        try
        {
            _flow = Start(variables);
            if (Block(body) is { } block) Execute(block);
            if (_flow.Returned == _conditions.True) return _flow.Result!;
            // The compiler reports a body that does not return; this stands for it unless something else is wrong here.
            return _problems.Found.Count > problemsBefore
                ? UnknownValue.Instance
                : Problem(Descriptors.NotResolved, body.GetLocation(), definition.Name);
        }
        finally
        {
            _active.RemoveAt(_active.Count - 1);
            _flow = before;
        }
    }

    private IOperation? Block(SyntaxNode body) =>
        _compilation.GetSemanticModel(body.SyntaxTree).GetOperation(body, _cancellation) switch
        {
            IMethodBodyBaseOperation method => method.BlockBody ?? method.ExpressionBody,
            ILocalFunctionOperation function => function.Body,
            IBlockOperation block => block,
            _ => null,
        };

    private Value MathCall(IInvocationOperation operation, IMethodSymbol method)
    {
        bool isWhole = WholeNumbers.Function(method.Name) is not null
            && method.Parameters.All(static parameter => WholeNumbers.IsWhole(parameter.Type));
        bool isRounding = method.Name == "Round"
            && method.Parameters is [{ Type.SpecialType: SpecialType.System_Double }, { Type.Name: "MidpointRounding" }];
        Operator? function = method.IsStatic ? MathFunctions.Find(method) : null;
        if (function is null && !isWhole && !isRounding) return OtherMathCall(operation, method);

        if (Arguments(operation, isLocal: false) is not { } arguments) return UnknownValue.Instance;
        if (arguments.Any(static argument => argument is UnknownValue)) return UnknownValue.Instance;
        if (function is { } known) return MathCall(operation, known, arguments);
        if (isWhole && OnIndices(operation, method.Name, arguments) is { } index) return index;
        if (isWhole) return WholeCall(operation, method, arguments);
        return arguments[1] is WholeValue { Choice: ChoiceLeaf<BigInteger> mode } && Rounding(mode.Value) is { } rounding
            ? MathCall(operation, rounding, [arguments[0]])
            : OtherMathCall(operation, method);
    }

    private UnknownValue OtherMathCall(IInvocationOperation operation, IMethodSymbol method)
    {
        IParameterSymbol? imprecise = method.Parameters.FirstOrDefault(
            static parameter => parameter.Type.SpecialType is SpecialType.System_Single or SpecialType.System_Decimal);
        return imprecise is not null
            ? Problem(Descriptors.NotDoublePrecision, operation, UserText.Of(operation.Syntax), imprecise.Type.ToDisplayString())
            : Problem(Descriptors.FunctionNotSupported, operation, Name(method), MathFunctions.AdviceFor(method.Name));
    }

    private Value MathCall(IInvocationOperation operation, Operator function, Value[] arguments)
    {
        int[] nodes = arguments.Select(Node).ToArray();
        int node = nodes.Length switch
        {
            1 => _graph.Unary(function, nodes[0]),
            2 => _graph.Binary(function, nodes[0], nodes[1]),
            _ => _graph.Ternary(function, nodes[0], nodes[1], nodes[2]),
        };
        if (MathFunctions.HasKink(function)) Remember(node, UserText.Of(operation.Syntax));
        if (function != Operator.Sign) return new NumberValue(node);

        // Math.Sign gives an int: as a number it is the node itself, in integer arithmetic a choice between its three values.
        Choice<BigInteger> sign = Choice.Between(
            _graph.Binary(Operator.Equal, node, _graph.Constant(1.0)),
            new ChoiceLeaf<BigInteger>(BigInteger.One),
            Choice.Between(
                _graph.Binary(Operator.Equal, node, _graph.Constant(-1.0)),
                new ChoiceLeaf<BigInteger>(BigInteger.MinusOne),
                new ChoiceLeaf<BigInteger>(BigInteger.Zero)));
        return new WholeValue(sign, node);
    }

    /// <summary>The values of System.MidpointRounding.</summary>
    private static Operator? Rounding(BigInteger mode) => (int)mode switch
    {
        0 => Operator.Round,
        1 => Operator.RoundAwayFromZero,
        2 => Operator.Truncate,
        3 => Operator.Floor,
        4 => Operator.Ceiling,
        _ => null,
    };

    private Value WholeCall(IInvocationOperation operation, IMethodSymbol method, Value[] arguments)
    {
        Choice<BigInteger>[] choices = arguments.Select(static argument => ((WholeValue)argument).Choice).ToArray();
        var function = WholeNumbers.Function(method.Name)!;
        return Whole(operation, () => choices[0].Combine(
            choices[choices.Length - 1], (a, b) => WholeNumbers.Fit(function(a, b), method.ReturnType, isChecked: true)));
    }
}
