using System.Globalization;
using OdeDsl.Assessment;
using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>The report as one HTML file that needs nothing else.</summary>
internal static class HtmlReport
{
    /// <param name="title">The report's title.</param>
    /// <param name="models">What is reported, in order.</param>
    /// <param name="provenance">Where it comes from.</param>
    public static string Write(string title, IReadOnlyList<ModelReport> models, Provenance provenance)
    {
        Markup markup = new Markup().Raw("<!DOCTYPE html>\n").Open("html", ("lang", "en")).Line();
        Head(markup, title);
        markup.Open("body").Line();
        markup.Open("header").Element("h1", title).Line();
        markup.Element("p", $"Assessment of {Words.Count(models.Count, "model")}, made {provenance.MadeText} with OdeDsl {Provenance.Version}.", ("class", "quiet"));
        markup.Close().Line();
        markup.Open("p", ("class", "caution"), ("role", "note")).Element("strong", "Caution. ").Text(Words.Caution).Close().Line();
        markup.Open("main").Line();
        Contents(markup, models);
        Summary(markup, models);
        foreach ((int index, ModelReport model) in models.Index()) ModelSection.Write(markup, model, Anchor(index));
        markup.Close().Line();
        Footer(markup, provenance);
        return markup.Close().Close().Line().ToString();
    }

    /// <summary>The id of a model's section. Names are not used: they may hold anything.</summary>
    public static string Anchor(int index) => string.Create(CultureInfo.InvariantCulture, $"model-{index + 1}");

    private static void Head(Markup markup, string title)
    {
        markup.Open("head").Line();
        markup.Raw("<meta charset=\"utf-8\"/>\n<meta name=\"viewport\" content=\"width=device-width,initial-scale=1\"/>\n");
        markup.Raw($"<meta http-equiv=\"Content-Security-Policy\" content=\"{Page.SecurityPolicy}\"/>\n");
        markup.Raw("<meta name=\"referrer\" content=\"no-referrer\"/>\n");
        markup.Element("title", title).Line();
        markup.Open("style").Raw("\n" + Theme.Alone + "\n" + Page.Style).Close().Line();
        markup.Close().Line();
    }

    private static void Contents(Markup markup, IReadOnlyList<ModelReport> models)
    {
        markup.Open("nav", ("aria-label", "Models")).Open("ul");
        foreach ((int index, ModelReport model) in models.Index())
            markup.Open("li").Element("a", model.Description.Name, ("href", "#" + Anchor(index))).Close();
        markup.Close().Close().Line();
    }

    private static void Summary(Markup markup, IReadOnlyList<ModelReport> models)
    {
        markup.Element("h2", "The four answers, model by model", ("id", "summary")).Line();
        Page.Table(
            markup,
            "Where each model rests, what its motion does, which change is nearest, which method computes it",
            ["Model", "Rests", "Motion", "Nearest change", "Method"],
            models.Select(static model => model.Assessment is { } assessment
                ? (IReadOnlyList<string>)[model.Description.Name, .. Answers.Of(assessment).Select(static answer => answer.Short)]
                : [model.Description.Name, "not assessed: " + model.Failure, "", "", ""]));
    }

    private static void Footer(Markup markup, Provenance provenance)
    {
        markup.Open("footer", ("class", "small quiet")).Element("h2", "Where this report comes from", ("class", "plain")).Line();
        Page.Paragraphs(
            markup,
            [
                $"OdeDsl {Provenance.Version} on {Provenance.Machine}. Made {provenance.MadeText}.",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"Settings: seed {provenance.Seed}, {provenance.SampledStarts} sampled starts for each model, wanted accuracy {provenance.WantedError:G3} of each state's range."),
                "The same models and settings give the same results on every run; wall times differ.",
                "Work is counted in evaluations of the rates: " + MethodAnswer.WorkRule + ".",
                Words.Caution,
            ]);
        markup.Close().Line();
    }
}
