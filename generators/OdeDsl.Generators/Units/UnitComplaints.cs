using Microsoft.CodeAnalysis;
using OdeDsl.Generators.Diagnostics;
using OdeDsl.Generators.Reading;

namespace OdeDsl.Generators.Units;

/// <summary>Compares units and tells where they do not fit.</summary>
internal sealed class UnitComplaints(Problems problems)
{
    private const int LongestText = 60;

    /// <summary>Whether what is found now is told elsewhere.</summary>
    public bool AreMuted { get; set; }

    /// <summary>Whether two operands can be added, compared or chosen between; if not, it is told at the second.</summary>
    public bool Fit(Unit first, IOperation firstPlace, Unit second, IOperation secondPlace)
    {
        if (first.Agrees(second)) return true;
        if (!first.Dimension.Equals(second.Dimension))
            Report(Descriptors.DimensionsDiffer, secondPlace, Text(secondPlace), second.Shown(), Text(firstPlace), first.Shown());
        else if (first.HasSizeOf(second))
            Shifted(first.IsShifted ? firstPlace : secondPlace, "it cannot be joined with kelvins");
        else
            Sizes(secondPlace, second, Text(firstPlace), first);
        return false;
    }

    /// <summary>Whether a result is in the unit it must be in.</summary>
    public void Result(Unit unit, IOperation place, string what, Unit wanted)
    {
        if (unit.Agrees(wanted)) return;
        if (!unit.Dimension.Equals(wanted.Dimension))
            Report(Descriptors.ResultUnit, place, Text(place), unit.Shown(), what, wanted.Shown());
        else if (unit.HasSizeOf(wanted))
            Shifted(place, "kelvins and degrees Celsius are not the same here");
        else
            Sizes(place, unit, what, wanted);
    }

    /// <summary>Whether an argument is a plain number, or an angle in radians.</summary>
    public void Number(Unit unit, IOperation place, string function)
    {
        if (!unit.Dimension.IsNone) Report(Descriptors.NumberExpected, place, Text(place), unit.Shown(), function);
        else if (!unit.HasSizeOf(Unit.One)) Sizes(place, unit, "the argument of " + function, Unit.One);
    }

    public void Exponent(Unit unit, IOperation place, IOperation exponent) =>
        Report(Descriptors.ExponentNotConstant, exponent, Text(place), unit.Shown(), Text(exponent));

    public void Shifted(IOperation place, string why) => Report(Descriptors.ShiftedScale, place, Text(place), why);

    private void Sizes(IOperation place, Unit unit, string other, Unit wanted) =>
        Report(Descriptors.SizesDiffer, place, Text(place), unit.ToString(), other, wanted.ToString(), unit.FactorTo(wanted));

    private static string Text(IOperation place)
    {
        string text = UserText.Of(place.Syntax);
        return "'" + (text.Length <= LongestText ? text : text.Substring(0, LongestText - 3) + "...") + "'";
    }

    private void Report(DiagnosticDescriptor descriptor, IOperation place, params object[] arguments)
    {
        if (!AreMuted) problems.Report(descriptor, place.Syntax.GetLocation(), arguments);
    }
}
