using OdeDsl.Modeling;

namespace OdeDsl.Assessment;

/// <summary>The range in which a parameter is explored for changes.</summary>
/// <param name="Lower">The lower end.</param>
/// <param name="Upper">The upper end.</param>
internal readonly record struct ParameterRange(double Lower, double Upper)
{
    /// <summary>
    /// The parameter's bounds; an infinite one is replaced by the value times or divided by the factor, whichever lies on that side,
    /// or by ± the factor for a value of zero. An end beyond which the value already lies is the value itself.
    /// </summary>
    public static ParameterRange Of(ParameterDescription parameter, double value, double factor)
    {
        (double below, double above) = value == 0
            ? (-factor, factor)
            : (Math.Min(value * factor, value / factor), Math.Max(value * factor, value / factor));
        double lower = double.IsFinite(parameter.Lower) ? parameter.Lower : below;
        double upper = double.IsFinite(parameter.Upper) ? parameter.Upper : above;
        return new ParameterRange(Math.Min(lower, value), Math.Max(upper, value));
    }
}
