namespace OdeDsl.Modeling;

/// <summary>Work that needs a system's equations as a type argument, so that they are compiled into its loops.</summary>
/// <typeparam name="TResult">What the work yields.</typeparam>
public interface ISystemOperation<out TResult>
{
    /// <summary>Does the work.</summary>
    /// <typeparam name="TSystem">The equations.</typeparam>
    /// <param name="system">The system they belong to.</param>
    /// <returns>The result.</returns>
    TResult Run<TSystem>(DynamicSystem system)
        where TSystem : struct, IOdeSystem;
}
