using OdeDsl.Workbench;
using Tarnwater;

// The models of Tarnwater, a small valley utility. The surge tank is assessed as the old drawings show it, more slender than the class
// proposes: stable, but not against every surge.
// The picture in README.md is its phase portrait: run with "--model SurgeTank --figures --output DIR" and copy DIR/model-1-portrait.svg to
// docs/images/surge-tank-portrait.svg.
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
