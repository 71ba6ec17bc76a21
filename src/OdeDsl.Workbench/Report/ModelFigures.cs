using OdeDsl.Assessment;
using OdeDsl.Integration;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Portraits;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>All figures of one model.</summary>
internal static class ModelFigures
{
    private const int CoursePoints = 1200, MostCourses = 5;

    /// <param name="system">The model.</param>
    /// <param name="assessment">What was found about it.</param>
    /// <param name="anchor">The beginning of the figures' ids.</param>
    /// <param name="cancellation">Ends the work.</param>
    public static IReadOnlyList<Figure> Of(DynamicSystem system, ModelAssessment assessment, string anchor, CancellationToken cancellation)
    {
        ModelDescription description = assessment.Description;
        string setting = Setting(description, assessment.Parameters);
        MotionTracer tracer = new(system, cancellation);
        Trajectory? motion = tracer.Run(system.InitialState, MotionTracer.TellingDuration(assessment));
        List<Figure> figures = [];
        IReadOnlyList<double[]> states = motion is null ? [] : motion.Sample(4 * CoursePoints);
        figures.AddRange(new PlanePictures(system, assessment, states, cancellation).All(anchor, setting).Select(PlaneFigure.Draw));
        if (motion is not null) figures.Add(Course(motion, anchor, setting));
        if (assessment.Margins.Parameters.Count > 0)
        {
            string caption = $"How far each parameter of {description.Name} can move alone before the attractors change, the narrowest margin first. Bars beyond ±100 % are cut.";
            figures.Add(MarginFigure.Draw(anchor + FigureIds.Margins, $"Margins of {description.Name}", caption, assessment.Margins));
        }

        string methods = $"Accuracy against work on the motion of {description.Name}, loosest tolerance on the left of each line. {setting}";
        if (MethodFigure.Draw(anchor + FigureIds.Methods, $"Integration methods on {description.Name}", methods, assessment.Method) is { } comparison)
            figures.Add(comparison);
        return figures;
    }

    /// <summary>The parameter values as a sentence.</summary>
    private static string Setting(ModelDescription description, IReadOnlyList<double> parameters) => description.Parameters.Length == 0
        ? "The model has no parameters."
        : string.Join(", ", description.Parameters.Select((parameter, i) => $"{parameter.Name} = {NumberText.With(parameters[i], parameter.Unit, 6)}")) + ".";

    private static Figure Course(Trajectory motion, string anchor, string setting)
    {
        ModelDescription description = motion.System.Description;
        Axis time = new() { Name = "Time", Unit = description.TimeUnit, Lower = motion.StartTime, Upper = motion.EndTime };
        IEnumerable<(string Name, double? Period)> quantities = description.States
            .Select(static state => (state.Name, state.AnglePeriod))
            .Concat(description.Observables.Select(static observable => (observable.Name, (double?)null)))
            .Take(MostCourses);
        TimeCourse[] courses = [.. quantities.Select(quantity => Course(motion, quantity.Name, quantity.Period))];
        string caption = $"The motion of {description.Name} from its own state. {setting}";
        return TimeCourseFigure.Draw(anchor + FigureIds.Course, $"Time course of {description.Name}", caption, time, courses);
    }

    private static TimeCourse Course(Trajectory motion, string name, double? period)
    {
        Series series = motion[name];
        double[] times = motion.SampleTimes(CoursePoints), values = series.Sample(CoursePoints);
        double lowest = values.Where(double.IsFinite).DefaultIfEmpty(0).Min(), highest = values.Where(double.IsFinite).DefaultIfEmpty(0).Max();
        double slack = highest > lowest ? 0.08 * (highest - lowest) : Math.Max(1e-6, 0.1 * Math.Abs(highest));
        bool turns = period is { } turn && highest - lowest > turn;
        Axis axis = turns
            ? new Axis { Name = name, Unit = series.Unit, Lower = -period!.Value / 2, Upper = period.Value / 2, Period = period }
            : new Axis { Name = name, Unit = series.Unit, Lower = lowest - slack, Upper = highest + slack };
        return new TimeCourse(axis, [.. times.Zip(values, static (time, value) => new PlanePoint(time, value))]);
    }
}
