using OdeDsl.Modeling;
using OdeDsl.Workbench.Hosting;

namespace OdeDsl.Workbench;

/// <summary>
/// Turns models into a command-line program that assesses them:
/// <c>return await Workbench.For(new SurgeTank()).And(new SumpRelay()).RunAsync(args);</c>
/// </summary>
public static class Workbench
{
    /// <summary>Starts a program with one model, with the numbers it holds now.</summary>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its equations.</typeparam>
    /// <param name="model">The model.</param>
    /// <returns>The program, to add to and run.</returns>
    /// <exception cref="ArgumentException">A state or parameter of the model is not finite.</exception>
    public static WorkbenchProgram For<TModel, TSystem>(IOdeModel<TModel, TSystem> model)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        new WorkbenchProgram().And(model);
}
