using System.Globalization;

namespace OdeDsl.Package.Tests;

/// <summary>The packed file, used by projects that know nothing else of this repository.</summary>
[Collection(Packed.Name)]
public sealed class PackageTests(Workplace place)
{
    /// <summary>
    /// Compiled ahead of time, and without fused multiplication by default, sums round differently. The simulation asks for 1e-9 a step;
    /// found differences are some 1e-13.
    /// </summary>
    private const double Tolerance = 1e-9;

    private const string Program = "Consumer";

    private static readonly string Version = $"-p:OdeDslVersion={Workplace.Version}";

    [Fact]
    public void A_strict_project_builds_without_a_warning_and_runs_whatever_the_culture()
    {
        string plain = place.Consumer("invariant");
        string finnish = place.Consumer("finnish");
        place.Dotnet(plain, Culture("C.UTF-8"), "build", "-c", "Release", "-o", "out", Version);
        place.Dotnet(finnish, Culture("fi_FI.UTF-8"), "build", "-c", "Release", "-o", "out", Version);
        Assert.Equal(Generated(plain), Generated(finnish));

        string numbers = Workplace.Run(Path.Combine(plain, "out"), Workplace.Executable(Program));
        Assert.Equal(numbers, Workplace.Run(Path.Combine(finnish, "out"), Workplace.Executable(Program), "finnish"));

        // The gate at rest: Load = Stiffness sin(angle), eigenvalues of the pendulum with damping, by hand.
        Dictionary<string, double> found = Parse(numbers);
        double angle = Math.Asin(0.8 / 2.25);
        Assert.InRange(found["rest.Focus.angle"], angle - Tolerance, angle + Tolerance);
        Assert.InRange(found["rest.Focus.leading"], -0.35 / 2 - Tolerance, -0.35 / 2 + Tolerance);
        double saddle = -0.35 / 2 + Math.Sqrt(0.35 * 0.35 / 4 + 2.25 * Math.Cos(angle));
        Assert.InRange(found["rest.Saddle.leading"], saddle - Tolerance, saddle + Tolerance);
        Assert.Equal(1, found["text.length"]);
        Assert.Equal(1, found["document.holds.rests"]);

        // The analyzers come along: a model that forgets a parameter is told of.
        InvalidOperationException told = Assert.Throws<InvalidOperationException>(() =>
            place.Dotnet(plain, "build", "-c", "Release", "-o", "out", "--no-restore", Version, "-p:DefineConstants=FORGETFUL"));
        Assert.Contains("error ODE0121: Nothing in model 'Forgetful' reads parameter 'Unused'", told.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Ahead_of_time_and_trimmed_the_same_project_publishes_without_a_warning_and_computes_the_same()
    {
        string folder = place.Consumer("published");
        string native = Path.Combine(folder, "native"), trimmed = Path.Combine(folder, "trimmed");
        place.Dotnet(folder, "publish", "-c", "Release", "-r", Workplace.Platform, Version, "-o", native);
        place.Dotnet(folder, "publish", "-c", "Release", "-r", Workplace.Platform, Version, "-p:PublishTrimmed=true", "-o", trimmed);
        Assert.False(File.Exists(Path.Combine(native, "OdeDsl.dll")), "The native program still needs the library's file.");

        Dictionary<string, double> justInTime = Parse(Workplace.Run(trimmed, Workplace.Executable(Program)));
        Dictionary<string, double> aheadOfTime = Parse(Workplace.Run(native, Workplace.Executable(Program)));
        Assert.Equal(justInTime.Keys.Order(), aheadOfTime.Keys.Order());
        Assert.True(justInTime.Count > 10);
        Assert.All(justInTime, number => Assert.True(
            Math.Abs(number.Value - aheadOfTime[number.Key]) <= Tolerance * Math.Max(1, Math.Abs(number.Value)),
            $"{number.Key}: {number.Value} just in time, {aheadOfTime[number.Key]} ahead of time"));
    }

    private static Dictionary<string, string> Culture(string name) => new() { ["LANG"] = name, ["LC_ALL"] = name };

    private static string Generated(string folder) =>
        File.ReadAllText(Assert.Single(Directory.GetFiles(Path.Combine(folder, "obj"), "*DamperedGate*.g.cs", SearchOption.AllDirectories)));

    private static Dictionary<string, double> Parse(string lines) => lines
        .Split('\n', StringSplitOptions.RemoveEmptyEntries)
        .Select(static line => line.Trim().Split(' '))
        .ToDictionary(static part => part[0], static part => double.Parse(part[1], CultureInfo.InvariantCulture));
}
