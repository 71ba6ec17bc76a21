namespace OdeDsl.Integration;

/// <summary>The integration methods.</summary>
public enum IntegrationMethod
{
    /// <summary>Starts with <see cref="DormandPrince54"/>, changes to <see cref="RadauIIA5"/> where the motion proves stiff, and back.</summary>
    Automatic,

    /// <summary>The explicit Runge-Kutta pair of orders 5 and 4 of Dormand and Prince (1980): for motion that is not stiff.</summary>
    DormandPrince54,

    /// <summary>The implicit Runge-Kutta method of Radau's right points with three stages and order 5 (Hairer and Wanner): for stiff motion.</summary>
    RadauIIA5,
}
