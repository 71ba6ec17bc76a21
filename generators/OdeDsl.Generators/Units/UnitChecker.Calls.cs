using System;
using System.Linq;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.Operations;
using OdeDsl.Generators.Algebra;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Units;

/// <content>Calls.</content>
internal sealed partial class UnitChecker
{
    private Measure Call(IInvocationOperation operation)
    {
        IMethodSymbol method = operation.TargetMethod;
        Measure[] measures = new Measure[method.Parameters.Length];
        IOperation[] places = new IOperation[measures.Length];
        foreach (IArgumentOperation argument in operation.Arguments)
        {
            if (argument.Parameter is not { } parameter) continue;
            measures[parameter.Ordinal] = Evaluate(argument.Value);
            places[parameter.Ordinal] = argument.Value;
            if (_stated.Of(parameter) is { } wanted && measures[parameter.Ordinal] is { Unit: { } unit, IsBare: false })
                _complaints.Result(unit, argument.Value, $"argument '{parameter.Name}'", wanted);
        }

        if (MathFunctions.IsHome(method.ContainingType))
            return MathFunctions.Find(method) is { } function ? Function(function, measures, places) : WholeFunction(measures);
        if (method.MethodKind != MethodKind.LocalFunction) return Member(method, measures);
        if (_stated.Of(method) is { } stated) return new(stated);

        // A local function sees the variables around it.
        var arguments = _variables.ToDictionary(static item => item.Key, static item => item.Value, SymbolEqualityComparer.Default);
        foreach (var own in Arguments(method, measures)) arguments[own.Key] = own.Value;
        return Bodies.Find(method, _compilation, _cancellation) is { } body ? Run(method, body, arguments!, null) : Measure.Unknown;
    }

    /// <summary>Functions of whole numbers, and rounding with a mode: what they return is like their first argument.</summary>
    private static Measure WholeFunction(Measure[] arguments) => arguments.Length == 0 ? Measure.Unknown : arguments[0];

    private Measure Function(Operator function, Measure[] measures, IOperation[] places)
    {
        switch (function)
        {
            case Operator.Abs or Operator.Floor or Operator.Ceiling or Operator.Truncate or Operator.Round:
                return measures[0];
            case Operator.Sign:
                return Measure.Bare;
            case Operator.Sqrt:
                return Power(measures[0], places[0], 0.5);
            case Operator.Cbrt:
                return Power(measures[0], places[0], 1.0 / 3);
            case Operator.Pow:
                return Pow(measures, places);
            case Operator.Min or Operator.Max or Operator.MinMagnitude or Operator.MaxMagnitude or Operator.Clamp or Operator.IEEERemainder:
                return Joined(measures.Zip(places, static (measure, place) => (measure, place)).ToArray());
            case Operator.Atan2:
                Joined(measures.Zip(places, static (measure, place) => (measure, place)).ToArray());
                return Measure.Plain;
            case Operator.CopySign:
                return measures[0];
            case Operator.FusedMultiplyAdd:
                return Joined([(Product(measures[0], places[0], measures[1], places[1], 1), places[0]), (measures[2], places[2])]);
            default:
                for (int i = 0; i < measures.Length; i++)
                {
                    if (measures[i].Unit is { } unit) _complaints.Number(unit, places[i], Name(function));
                }

                return Measure.Plain;
        }
    }

    private Measure Pow(Measure[] measures, IOperation[] places)
    {
        if (measures[1].Unit is { } exponentUnit) _complaints.Number(exponentUnit, places[1], "an exponent");
        if (measures[0].Unit is not { } unit) return Measure.Unknown;
        if (unit.Agrees(Unit.One)) return measures[0] with { IsBare = measures[0].IsBare && measures[1].IsBare };
        if (places[1].ConstantValue is { HasValue: true, Value: IConvertible exponent })
            return Power(measures[0], places[0], exponent.ToDouble(System.Globalization.CultureInfo.InvariantCulture));
        _complaints.Exponent(unit, places[0], places[1]);
        return Measure.Unknown;
    }

    private Measure Power(Measure measure, IOperation place, double exponent)
    {
        if (measure.Unit is not { } unit) return Measure.Unknown;
        if (!unit.IsShifted) return measure with { Unit = unit.Power(exponent) };
        _complaints.Shifted(place, "a power of it means nothing");
        return Measure.Unknown;
    }

    private static string Name(Operator function) => "Math." + (function == Operator.LogBase ? "Log" : function.ToString());
}
