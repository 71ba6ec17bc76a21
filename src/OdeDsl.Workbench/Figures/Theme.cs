namespace OdeDsl.Workbench.Figures;

/// <summary>
/// The look of figures and reports, in one place. Every distinction that a colour makes is also made by shape, dash or width, so that
/// figures can be read in grey and by colour-blind people. Text has a contrast of at least 4.5 to 1 and lines that carry meaning at
/// least 3 to 1 against the paper (Web Content Accessibility Guidelines 2.2, criteria 1.4.3 and 1.4.11) in both themes.
/// </summary>
internal static class Theme
{
    /// <summary>Colours by role, light and dark; on paper always light.</summary>
    public const string Colours = """
        :root{--ink:#1c2530;--quiet:#55606e;--paper:#fff;--panel:#f3f5f8;--rule:#d5dbe3;--grid:#e6eaef;
        --steady:#0b5394;--unsteady:#b3430b;--level:#00705a;--other:#7d5a00;--wall:#8a3a78;--motion:#4a5563}
        @media screen and (prefers-color-scheme:dark){:root{--ink:#e4e9f0;--quiet:#a3afbd;--paper:#14181e;--panel:#1d232b;--rule:#3a4450;--grid:#272e37;
        --steady:#72b7ff;--unsteady:#ff9d66;--level:#4fd1ad;--other:#e3b75c;--wall:#e19ad2;--motion:#b3bfcc}}
        """;

    /// <summary>Rules for the inside of figures.</summary>
    public const string Figures = """
        .figure{font-family:"OdeDsl Sans",sans-serif;font-size:13px;fill:var(--ink)}
        .figure text{fill:var(--ink);stroke:none}
        .figure .name{font-weight:bold}
        .figure .quiet{fill:var(--quiet)}
        .figure .halo{paint-order:stroke;stroke:var(--paper);stroke-width:4px;stroke-linejoin:round}
        .figure path,.figure line{fill:none;stroke-linecap:round;stroke-linejoin:round}
        .figure .paper{fill:var(--paper)}
        .figure .grid{stroke:var(--grid);stroke-width:1}
        .figure .frame{fill:none;stroke:var(--quiet);stroke-width:1}
        .figure .zero{stroke:var(--quiet);stroke-width:1.5}
        .figure .field{stroke:var(--quiet);stroke-width:1.1}
        .figure .steady-cycle{stroke:var(--steady);stroke-width:3.6}
        .figure .unsteady-cycle{stroke:var(--unsteady);stroke-width:3;stroke-dasharray:9 6}
        .figure .undecided-cycle{stroke:var(--motion);stroke-width:3;stroke-dasharray:2 6}
        .figure .orbit{stroke:var(--steady);stroke-width:1.8}
        .figure .into-saddle{stroke:var(--ink);stroke-width:1.9}
        .figure .from-saddle{stroke:var(--ink);stroke-width:1.5;stroke-dasharray:6 4}
        .figure .level-x{stroke:var(--level);stroke-width:1.7;stroke-dasharray:12 3 2 3}
        .figure .level-y{stroke:var(--other);stroke-width:1.7;stroke-dasharray:2 4}
        .figure .wall{stroke:var(--wall);stroke-width:2.4;stroke-dasharray:1 5}
        .figure .motion{stroke:var(--motion);stroke-width:1.5}
        .figure .head{stroke:none}
        .figure .steady-cycle.head,.figure .orbit.head{fill:var(--steady)}
        .figure .unsteady-cycle.head{fill:var(--unsteady)}
        .figure .motion.head,.figure .undecided-cycle.head{fill:var(--motion)}
        .figure .into-saddle.head,.figure .from-saddle.head{fill:var(--ink)}
        .figure .stable-rest{fill:var(--steady);stroke:var(--paper);stroke-width:1.5}
        .figure .unstable-rest{fill:var(--paper);stroke:var(--unsteady);stroke-width:2.6}
        .figure .saddle-rest{fill:var(--paper);stroke:var(--ink);stroke-width:2.2}
        .figure .undecided-rest{fill:var(--paper);stroke:var(--motion);stroke-width:2.4}
        .figure .dot{fill:var(--ink);stroke:none}
        .figure .start{stroke:var(--motion);stroke-width:2.4}
        .figure .span{fill:var(--steady);fill-opacity:.28;stroke:none}
        .figure .edge{stroke:var(--unsteady);stroke-width:3.4}
        .figure .beyond{stroke:var(--steady);stroke-width:1.6;stroke-dasharray:2 4}
        .figure .wanted{stroke:var(--unsteady);stroke-width:1.6;stroke-dasharray:7 4}
        .figure .method-0{stroke:var(--steady);fill:var(--steady);stroke-width:1.8}
        .figure .method-1{stroke:var(--unsteady);fill:var(--paper);stroke-width:1.8;stroke-dasharray:7 4}
        .figure .method-2{stroke:var(--level);fill:none;stroke-width:1.8;stroke-dasharray:2 4}
        .figure path.method-0,.figure path.method-1,.figure path.method-2{fill:none}
        .figure .spot{stroke-dasharray:none}
        .figure .chosen{fill:none;stroke:var(--ink);stroke-width:2}
        """;

    /// <summary>The bundled letters, as a style rule that holds them.</summary>
    public static string Fonts { get; } = Face("sans-regular.woff2", "normal") + Face("sans-bold.woff2", "bold");

    /// <summary>All rules a figure needs when it stands alone.</summary>
    public static string Alone { get; } = Fonts + Colours + Figures;

    // Without "block" a browser on a machine without any font never begins to read the letters.
    private static string Face(string resource, string weight)
    {
        using Stream stream = typeof(Theme).Assembly.GetManifestResourceStream(resource)
            ?? throw new InvalidOperationException($"The embedded font {resource} is missing from the build.");
        byte[] font = new byte[stream.Length];
        stream.ReadExactly(font);
        return $"@font-face{{font-family:\"OdeDsl Sans\";font-weight:{weight};src:url(data:font/woff2;base64,{Convert.ToBase64String(font)}) format(\"woff2\");font-display:block}}\n";
    }
}
