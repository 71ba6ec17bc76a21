using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>The look of the report and the pieces its sections are made of.</summary>
internal static class Page
{
    /// <summary>Nothing may be fetched and nothing may run, whatever a name smuggles in.</summary>
    public const string SecurityPolicy = "default-src 'none'; style-src 'unsafe-inline'; font-src data:";

    public const string Style = """
        *{box-sizing:border-box}
        html{color-scheme:light dark;font-family:"OdeDsl Sans"}
        body{margin:0 auto;padding:1.2rem 1.2rem 4rem;max-width:58rem;background:var(--paper);color:var(--ink);
        font:16px/1.55 "OdeDsl Sans",sans-serif;overflow-wrap:anywhere}
        h1{font-size:1.7rem;line-height:1.25;margin:.6rem 0 .2rem}
        h2{font-size:1.35rem;margin:3rem 0 .3rem;padding-top:.7rem;border-top:3px solid var(--steady)}
        h3{font-size:1.05rem;margin:1.9rem 0 .4rem}
        p{margin:.5rem 0}
        a{color:var(--steady)}
        .quiet{color:var(--quiet)}
        .small{font-size:.85rem}
        .caution{border-left:5px solid var(--unsteady);background:var(--panel);padding:.7rem 1rem;margin:1rem 0}
        .failure{border-left:5px solid var(--unsteady);background:var(--panel);padding:.7rem 1rem;margin:1rem 0;font-weight:bold}
        nav ul{list-style:none;padding:0;display:flex;flex-wrap:wrap;gap:.3rem 1.2rem}
        .wide{overflow-x:auto;margin:.6rem 0 1rem}
        .wide:focus-visible{outline:2px solid var(--steady)}
        table{border-collapse:collapse;width:100%;font-size:.86rem;overflow-wrap:normal}
        caption{text-align:left;padding:.2rem 0;color:var(--quiet)}
        th,td{text-align:left;vertical-align:top;padding:.35rem .7rem .35rem 0;border-bottom:1px solid var(--rule)}
        tbody th{white-space:nowrap}
        thead th{border-bottom:2px solid var(--quiet)}
        td.number,th.number{text-align:right;white-space:nowrap;font-variant-numeric:tabular-nums}
        code{font-family:ui-monospace,"OdeDsl Sans",monospace;font-size:.9em}
        .equations{margin:.5rem 0;padding:0;list-style:none}
        .equations li{padding:.15rem 0}
        dl.answers{display:grid;grid-template-columns:max-content 1fr;gap:.35rem 1.2rem;background:var(--panel);padding:.8rem 1rem;margin:1rem 0}
        dl.answers dt{font-weight:bold}
        dl.answers dd{margin:0}
        @media (max-width:36rem){dl.answers{grid-template-columns:1fr;gap:.1rem}dl.answers dd{margin-bottom:.6rem}}
        figure{margin:1.2rem 0;break-inside:avoid}
        figure .wide{margin:0}
        figure svg{display:block;width:100%;min-width:30rem;height:auto}
        figcaption{font-size:.86rem;color:var(--quiet)}
        footer{margin-top:3rem;border-top:1px solid var(--rule);padding-top:.6rem}
        @media print{body{max-width:none;padding:0;font-size:11pt}h2{break-before:page}h3{break-after:avoid}tr{break-inside:avoid}
        .wide{overflow:visible}figure svg{min-width:0;max-height:17cm}nav{display:none}a{color:inherit;text-decoration:none}}

        """;

    /// <summary>Writes a table that scrolls by itself on narrow screens.</summary>
    /// <param name="markup">Receives it.</param>
    /// <param name="caption">What it holds.</param>
    /// <param name="headings">The headings; one that begins with '#' is a column of numbers.</param>
    /// <param name="rows">The rows, a text for each heading.</param>
    public static void Table(Markup markup, string caption, IReadOnlyList<string> headings, IEnumerable<IReadOnlyList<string>> rows)
    {
        markup.Open("div", ("class", "wide"), ("role", "region"), ("aria-label", caption), ("tabindex", "0"));
        markup.Open("table").Element("caption", caption).Open("thead").Open("tr");
        foreach (string heading in headings) markup.Element("th", heading.TrimStart('#'), ("scope", "col"), ("class", KindOf(heading)));
        markup.Close().Close().Line().Open("tbody");
        foreach (IReadOnlyList<string> row in rows)
        {
            markup.Open("tr");
            markup.Element("th", row[0], ("scope", "row"), ("class", KindOf(headings[0])));
            for (int i = 1; i < headings.Count; i++) markup.Element("td", row[i], ("class", KindOf(headings[i])));
            markup.Close().Line();
        }

        markup.Close().Close().Close().Line();
    }

    public static void Figure(Markup markup, Figure figure)
    {
        markup.Open("figure", ("id", figure.Id));
        markup.Open("div", ("class", "wide"), ("role", "region"), ("aria-label", figure.Title), ("tabindex", "0")).Raw(figure.Svg).Close();
        markup.Element("figcaption", figure.Caption).Close().Line();
    }

    /// <summary>Writes sentences, a paragraph each, with their numbers set for people.</summary>
    public static void Paragraphs(Markup markup, IEnumerable<string> texts, string kind = "")
    {
        foreach (string text in texts.Where(static text => text.Length > 0)) markup.Element("p", NumberText.Typeset(text), ("class", kind)).Line();
    }

    private static string KindOf(string heading) => heading.StartsWith('#') ? "number" : "text";
}
