namespace OdeDsl.Workbench.Figures;

/// <summary>How wide text runs in the bundled font: enough to lay out legends and labels.</summary>
internal static class TextWidth
{
    // Advance widths of the characters from space to tilde in thousandths of the font size, from the font's own table.
    private static ReadOnlySpan<short> Widths =>
    [
        318, 401, 460, 838, 636, 950, 780, 275, 390, 390, 500, 838, 318, 361, 318, 337, 636, 636, 636, 636, 636, 636, 636, 636, 636, 636,
        337, 337, 838, 838, 838, 531, 1000, 684, 686, 698, 770, 632, 575, 775, 752, 295, 295, 656, 557, 863, 748, 787, 603, 787, 695, 635,
        611, 732, 684, 989, 685, 611, 685, 390, 337, 390, 838, 500, 500, 613, 635, 550, 635, 615, 352, 635, 634, 278, 278, 579, 278, 974,
        634, 612, 635, 635, 411, 521, 392, 634, 592, 818, 592, 592, 525, 636, 337, 636, 838,
    ];

    // Other characters (accents, minus, superscripts) are seldom wider than this.
    private const double Other = 838;

    /// <summary>The width at a font size, in the same unit as the size.</summary>
    public static double Of(string text, double size)
    {
        double sum = 0;
        foreach (char letter in text) sum += letter is >= ' ' and <= '~' ? Widths[letter - ' '] : Other;
        return sum * size / 1000;
    }
}
