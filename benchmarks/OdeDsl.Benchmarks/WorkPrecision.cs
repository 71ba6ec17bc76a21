using System.Diagnostics;
using System.Globalization;
using OdeDsl.Integration;
using OdeDsl.Tests.Problems;

namespace OdeDsl.Benchmarks;

/// <summary>
/// The work-precision study: every method on every public problem over the tolerances, as time and correct digits at the end.
/// Timed are restart and integration to the end time without output, as in comparisons of solver libraries; set-up is not.
/// </summary>
internal static class WorkPrecision
{
    private const string Header = "problem,library,method,rtol,atol,wall_us_min,wall_us_median,cpu_us_min,reps,steps,nfev,njev,error_scd,status";
    private const double SecondsPerPoint = 0.05;
    private const int FewestRuns = 3;
    private const int MostRuns = 4000;

    private static readonly IntegrationMethod[] Explicit =
        [IntegrationMethod.DormandPrince54, IntegrationMethod.Tsitouras54, IntegrationMethod.DormandPrince853];

    private static readonly double[] Tolerances = [1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9, 1e-10, 1e-11, 1e-13];

    /// <summary>Runs the study.</summary>
    /// <param name="output">Receives a header and a line per problem, method and tolerance.</param>
    public static void Write(TextWriter output)
    {
        output.WriteLine(Header);
        foreach (PublicProblem problem in PublicProblem.Nonstiff.Concat(PublicProblem.Stiff))
        {
            foreach (IntegrationMethod method in Methods(problem))
            {
                foreach (double tolerance in Tolerances)
                {
                    output.WriteLine(Measure(problem, method, tolerance));
                    output.Flush();
                }
            }
        }
    }

    /// <summary>Explicit methods are left out where stiffness would keep them busy for minutes.</summary>
    private static IEnumerable<IntegrationMethod> Methods(PublicProblem problem) => Enum.GetValues<IntegrationMethod>()
        .Where(method => PublicProblem.Nonstiff.Contains(problem) || !Explicit.Contains(method));

    private static string Measure(PublicProblem problem, IntegrationMethod method, double tolerance)
    {
        var flow = new Flow(problem.System, new FlowOptions
        {
            Method = method,
            RelativeTolerance = tolerance,
            AbsoluteTolerance = tolerance * problem.AbsolutePart,
        });
        double[] state = new double[problem.System.StateCount];
        List<double> times = [];
        long steps = 0, evaluations = 0;
        double total = 0;
        string status = "ok";
        while (times.Count < MostRuns && (times.Count < FewestRuns || total < SecondsPerPoint))
        {
            problem.System.InitialState.CopyTo(state);
            (long stepsBefore, long evaluationsBefore) = (flow.AcceptedSteps, flow.RateEvaluations);
            long start = Stopwatch.GetTimestamp();
            try
            {
                flow.Advance(state, 0, problem.Until);
            }
            catch (IntegrationException)
            {
                status = "fail";
            }

            double seconds = Stopwatch.GetElapsedTime(start).TotalSeconds;
            times.Add(seconds);
            total += seconds;
            steps = flow.AcceptedSteps - stepsBefore;
            evaluations = flow.RateEvaluations - evaluationsBefore;
            if (status != "ok") break;
        }

        times.Sort();
        double digits = status == "ok" ? Math.Min(16, problem.CorrectDigits(state)) : -99;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{FileName(problem)},odedsl,{method},{tolerance:0e-00},{tolerance * problem.AbsolutePart:0.0e-00},{times[0] * 1e6:F3},{times[times.Count / 2] * 1e6:F3},{times[0] * 1e6:F3},{times.Count},{steps},{evaluations},0,{digits:F3},{status}");
    }

    private static string FileName(PublicProblem problem) => problem.Name switch
    {
        "Lorenz 63" => "lorenz63",
        "Lotka-Volterra" => "lotka_volterra",
        "Arenstorf orbit" => "arenstorf",
        "van der Pol 1" => "vdp_mu1",
        "van der Pol 1000" => "vdp_mu1000",
        "Robertson to 1e5" => "robertson_1e5",
        "Robertson to 1e11" => "robertson_1e11",
        _ => problem.Name.ToLowerInvariant(),
    };
}
