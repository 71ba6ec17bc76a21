using OdeDsl;

var tank = new BalanceTank();

// One run: dense, so that it can be asked at any time.
var run = tank.Simulate(until: 7200);
Console.WriteLine(run[tank.Level]);
Console.WriteLine(run[tank.Outflow]);

// Where it comes to rest, whether it keeps swinging, how far each parameter is from changing that, and which method computes it fast.
// These are predictions of a model: they support, and do not replace, verification and the judgement of licensed engineers.
Console.WriteLine(tank.Assess());
