using System.Globalization;
using System.Text.RegularExpressions;

namespace OdeDsl.Package.Tests;

/// <summary>The project template, installed from its packed file into a place of its own.</summary>
[Collection(Packed.Name)]
public sealed class TemplateTests(Workplace place)
{
    [Fact]
    public void A_project_made_from_the_template_builds_without_a_warning_and_assesses_its_model()
    {
        string hive = Path.Combine(place.Folder, "hive");
        string[] ownHive = ["--debug:custom-hive", hive];
        place.Dotnet(place.Folder, ["new", "install", Path.Combine(place.Feed, $"OdeDsl.Templates.{Workplace.Version}.nupkg"), .. ownHive]);
        place.Dotnet(place.Folder, ["new", "odemodel", "--output", "Trial", "--no-update-check", .. ownHive]);
        string folder = Path.Combine(place.Folder, "Trial");
        place.Dotnet(folder, "build", "-c", "Release", "-o", "out", "-warnaserror", "-p:NuGetAudit=false");

        string printed = Workplace.Run(Path.Combine(folder, "out"), Workplace.Executable("Trial"));
        Assert.Contains("Level: ", printed, StringComparison.Ordinal);
        // The inflow at which Gain is all that the condition in the template's remarks allows, solved for a.
        double b = Math.Sqrt(2 * 9.81 * 3) / 60, a = (-1 / 20.0 + Math.Sqrt(1 / 400.0 + 4 * 5e-4 * b)) / 2;
        double inflow = 2 * 60 * 3 * a;
        Match told = Regex.Match(printed, @"Inflow down to ([0-9.]+) m3/s .*Hopf point");
        Assert.True(told.Success, printed);
        Assert.InRange(double.Parse(told.Groups[1].Value, CultureInfo.InvariantCulture) / inflow, 1 - 1e-4, 1 + 1e-4);
    }
}
