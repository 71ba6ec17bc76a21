namespace OdeDsl.Integration;

/// <summary>The integration methods.</summary>
public enum IntegrationMethod
{
    /// <summary>
    /// Chooses by the tolerance: an explicit method to start with, an implicit one where the motion proves stiff, and back where it no
    /// longer is.
    /// </summary>
    Automatic,

    /// <summary>The explicit Runge-Kutta pair of orders 5 and 4 of Dormand and Prince (1980): for motion that is not stiff.</summary>
    DormandPrince54,

    /// <summary>The implicit Runge-Kutta method of Radau's right points with three stages and order 5 (Hairer and Wanner): for stiff motion.</summary>
    RadauIIA5,

    /// <summary>The explicit Runge-Kutta pair of orders 5 and 4 of Tsitouras (2011): for motion that is not stiff, at loose tolerances.</summary>
    Tsitouras54,

    /// <summary>
    /// The explicit Runge-Kutta method of order 8 of Dormand, Prince, Hairer, Norsett and Wanner (1993): for smooth motion that is not
    /// stiff, at all but the loosest tolerances.
    /// </summary>
    DormandPrince853,

    /// <summary>The implicit Runge-Kutta method of Radau's right points with five stages and order 9: for stiff motion at tight tolerances.</summary>
    RadauIIA9,

    /// <summary>The implicit Runge-Kutta method of Radau's right points with seven stages and order 13: for stiff motion at very tight tolerances.</summary>
    RadauIIA13,

    /// <summary>
    /// The implicit Runge-Kutta methods of Radau's right points with three, five and seven stages; changes between the orders 5, 9 and 13
    /// with the tolerance and the convergence of Newton's iterations (Hairer and Wanner, 1999).
    /// </summary>
    RadauIIA,

    /// <summary>
    /// The linearly implicit Rosenbrock method of order 4 of Hairer and Wanner (1996): for stiff motion at loose tolerances.
    /// </summary>
    Rodas4,

    /// <summary>
    /// The linearly implicit Rosenbrock method of order 5 of Steinebach (2023): for stiff motion at moderate tolerances.
    /// </summary>
    Rodas5P,

    /// <summary>
    /// The backward differentiation formulas of variable order 1 to 5 and variable step, in the form of Shampine and Reichelt (1997): for large
    /// stiff systems at loose and moderate tolerances; every crossing starts them anew with order 1.
    /// </summary>
    BackwardDifferentiation,
}
