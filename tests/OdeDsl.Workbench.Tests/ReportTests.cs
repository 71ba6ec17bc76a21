using System.Text.RegularExpressions;
using System.Xml;
using System.Xml.Linq;
using OdeDsl.Workbench;

namespace WorkbenchTests;

public class ReportTests
{
    private static readonly string[] Fetching = ["script", "link", "img", "iframe", "object", "embed", "image", "use", "base", "form"];
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";

    [Fact]
    public async Task A_report_is_well_formed_and_fetches_nothing()
    {
        (string text, XElement page) = await Report(Workbench.For(new Swing()));

        Assert.All(page.DescendantsAndSelf(), static element =>
        {
            Assert.DoesNotContain(element.Name.LocalName, Fetching);
            Assert.All(element.Attributes(), static attribute =>
            {
                Assert.False(attribute.Name.LocalName.StartsWith("on", StringComparison.OrdinalIgnoreCase));
                if (attribute.Name.LocalName is "href" or "src") Assert.StartsWith("#", attribute.Value, StringComparison.Ordinal);
            });
        });
        string withoutNames = text.Replace("http://www.w3.org/2000/svg", "", StringComparison.Ordinal);
        Assert.DoesNotContain("http:", withoutNames, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain("https:", withoutNames, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain("@import", text, StringComparison.OrdinalIgnoreCase);
        Assert.All(Regex.Matches(text, @"url\(([^)]*)\)").Select(static match => match.Groups[1].Value), static target =>
            Assert.True(target.StartsWith('#') || target.StartsWith("data:font/woff2;base64,", StringComparison.Ordinal), target));
    }

    [Fact]
    public async Task A_report_brings_its_own_letters()
    {
        (string text, _) = await Report(Workbench.For(new Swing()));

        Assert.Equal(2, Regex.Count(text, "@font-face"));
        Assert.Contains("\"OdeDsl Sans\",sans-serif", text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_report_holds_the_four_answers_the_equations_the_caution_and_its_origin()
    {
        (_, XElement page) = await Report(Workbench.For(new Swing()));
        string text = page.Value;

        Assert.All(
            [
                "Where it rests", "Whether it keeps moving", "How far each parameter is from a change", "Which method computes it",
                "dRate/dt = -Stiffness * Tilt - Drag * Rate", "Damping.", "licensed engineers", "seed 1", "OdeDsl 0.1.0",
            ],
            part => Assert.Contains(part, text, StringComparison.Ordinal));
    }

    [Fact]
    public async Task Every_figure_names_its_axes_with_units_and_speaks_to_those_who_cannot_see_it()
    {
        (_, XElement page) = await Report(Workbench.For(new Swing()));

        XElement[] figures = [.. page.Descendants(Svg + "svg")];
        Assert.True(figures.Length >= 4);
        Assert.All(figures, static figure =>
        {
            string[] names = [.. figure.Descendants(Svg + "text").Where(static text => (string?)text.Attribute("class") == "name").Select(static text => text.Value)];
            Assert.NotEmpty(names);
            Assert.All(names, static name => Assert.Matches(@"^.+ \(.+\)$", name));
            string[] labels = ((string)figure.Attribute("aria-labelledby")!).Split(' ');
            Assert.All(labels, id => Assert.NotEqual("", figure.Elements().Single(element => (string?)element.Attribute("id") == id).Value));
            Assert.Equal("img", (string?)figure.Attribute("role"));
            Assert.NotEqual("", figure.Parent!.Parent!.Element("figcaption")!.Value);
        });
        Assert.Contains(page.Descendants(Svg + "text"), static text => text.Value == "Tilt (rad)");
        Assert.Contains(page.Descendants(Svg + "text"), static text => text.Value == "Rate (rad/s)");
        Assert.Contains(page.Descendants(Svg + "text"), static text => text.Value == "Time (s)");
    }

    [Fact]
    public async Task Captions_state_the_parameters()
    {
        (_, XElement page) = await Report(Workbench.For(new Swing { Drag = 0.75 }));

        Assert.Contains(page.Descendants("figcaption"), static caption => caption.Value.Contains("Drag = 0.75\u00A01/s", StringComparison.Ordinal));
    }

    [Fact]
    public async Task Ids_are_unique_so_that_links_and_clips_lead_where_they_should()
    {
        (_, XElement page) = await Report(Workbench.For(new Swing()).And(new Swing { Drag = 1 }));

        string[] ids = [.. page.Descendants().Attributes("id").Select(static id => id.Value)];
        Assert.Equal(ids.Length, ids.Distinct().Count());
        Assert.All(page.Descendants("a").Attributes("href"), href => Assert.Contains(href.Value[1..], ids));
    }

    [Fact]
    public async Task Hostile_names_and_units_are_shown_as_text()
    {
        using Hosts.Folder folder = new();

        (int code, string output, _) = await Hosts.Run(Workbench.For(new Hostile()), ["--output", folder.Path]);
        string text = folder.Read("report.html");
        XElement page = Parse(text);

        Assert.Equal(0, code);
        Assert.DoesNotContain("<script", text, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain("<img", text, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain('\u202E', text);
        Assert.DoesNotContain('\u0007', text);
        Assert.Empty(page.Descendants("script"));
        Assert.All(page.Descendants().Attributes(), static attribute => Assert.False(attribute.Name.LocalName.StartsWith("on", StringComparison.Ordinal)));
        Assert.Contains("alert(1)", page.Value, StringComparison.Ordinal);
        Assert.Contains("[bold]m[/]", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Headings_are_nested_without_gaps()
    {
        (_, XElement page) = await Report(Workbench.For(new Swing()));

        int level = 0;
        foreach (XElement heading in page.Descendants().Where(static element => Regex.IsMatch(element.Name.LocalName, "^h[1-6]$")))
        {
            int next = heading.Name.LocalName[1] - '0';
            Assert.True(next <= level + 1, heading.Value);
            level = next;
        }

        Assert.Single(page.Descendants("h1"));
    }

    private static async Task<(string Text, XElement Page)> Report(WorkbenchProgram program)
    {
        using Hosts.Folder folder = new();
        (int code, _, string error) = await Hosts.Run(program, ["--output", folder.Path]);
        Assert.True(code == 0, error);
        string text = folder.Read("report.html");
        return (text, Parse(text));
    }

    private static XElement Parse(string text)
    {
        using XmlReader reader = XmlReader.Create(new StringReader(text), new XmlReaderSettings { DtdProcessing = DtdProcessing.Ignore });
        return XElement.Load(reader);
    }
}
