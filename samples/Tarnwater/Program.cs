using OdeDsl.Workbench;
using Tarnwater;

// The models of Tarnwater, a small valley utility. The surge tank is assessed as the old drawings show it, more slender than the class
// proposes: stable, but not against every surge.
return await Workbench
    .For(new SurgeTank { TankArea = 45 })
    .And(new TieLineMachine())
    .And(new UnbalancedDrum())
    .And(new SludgeBasin())
    .And(new HeatedReactor())
    .And(new SumpRelay())
    .And(new StirredMixer())
    .Titled("Tarnwater valley utility")
    .RunAsync(args);
