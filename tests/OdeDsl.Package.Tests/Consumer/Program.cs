using System.Globalization;
using Consumer;
using OdeDsl;
using OdeDsl.Assessment;
using OdeDsl.Equilibria;
using OdeDsl.Integration;

// Prints one named number a line. The culture of the program must not matter.
if (args is ["finnish"])
{
    CultureInfo culture = (CultureInfo)CultureInfo.InvariantCulture.Clone();
    culture.NumberFormat.NegativeSign = "\u2212";
    culture.NumberFormat.NumberDecimalSeparator = ",";
    culture.NumberFormat.NumberGroupSeparator = "\u00a0";
    CultureInfo.CurrentCulture = CultureInfo.DefaultThreadCurrentCulture = culture;
}

DamperedGate gate = new() { Load = 0.8 };

Trajectory run = gate.Simulate(until: 12, new SimulationOptions { RelativeTolerance = 1e-9, AbsoluteTolerance = 1e-9 });
Print("run.angle", run[gate.Angle].Final);
Print("run.speed", run[gate.Speed].Final);
Print("run.energy", run[gate.Energy].Final);

ModelAssessment assessment = gate.Assess();
foreach (Equilibrium rest in assessment.Rests.Equilibria)
{
    Print($"rest.{rest.Kind}.angle", rest.State[0]);
    Print($"rest.{rest.Kind}.leading", rest.LeadingMode!.Eigenvalue.Real);
}

Print("outcomes", assessment.Motions.Outcomes.Count);
foreach (ParameterMargin margin in assessment.Margins.Parameters.OrderBy(static margin => margin.ParameterIndex))
    Print($"margin.{margin.Parameter.Name}", margin.NearestPercent);
Print("text.length", assessment.ToString().Length > 100 ? 1 : 0);
Print("document.holds.rests", assessment.ToJson(includeTimings: false).Contains("\"rests\"", StringComparison.Ordinal) ? 1 : 0);

static void Print(string name, double value) => Console.WriteLine(name + " " + value.ToString("R", CultureInfo.InvariantCulture));
