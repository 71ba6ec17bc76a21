using System.Globalization;
using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>Numbers with units for sentences.</summary>
internal static class AssessmentText
{
    /// <summary>A number with its unit; "1" is the unit of a pure number and is not written.</summary>
    public static string Quantity(double value, string unit, string format = "G5") =>
        unit is not ("" or "1") ? Number(value, format) + " " + unit : Number(value, format);

    /// <summary>A time in the model's unit.</summary>
    public static string Time(ModelDescription description, double value) =>
        description.TimeUnit.Length > 0 ? Quantity(value, description.TimeUnit) : Number(value, "G5") + " units of time";

    /// <summary>An angular frequency in radians per unit of time.</summary>
    public static string Frequency(ModelDescription description, double value) =>
        Number(value, "G6") + " rad/" + (description.TimeUnit.Length > 0 ? description.TimeUnit : "unit of time");

    /// <summary>A state vector by names: "Level -2.27 m, Velocity 2.13 m/s".</summary>
    public static string State(ModelDescription description, IEnumerable<double> state) =>
        string.Join(", ", description.States.Zip(state, static (item, value) => item.Name + " " + Quantity(value, item.Unit)));

    /// <summary>A number in the invariant culture.</summary>
    public static string Number(double value, string format) => value.ToString(format, CultureInfo.InvariantCulture);
}
