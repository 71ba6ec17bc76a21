namespace OdeDsl.Workbench.Figures;

/// <summary>The shapes of marked points: told apart without colour.</summary>
internal static class Marks
{
    public static void Draw(Markup markup, MarkKind kind, double x, double y)
    {
        switch (kind)
        {
            case MarkKind.StableRest: Disc(markup, "stable-rest", x, y, 7); break;
            case MarkKind.UnstableRest: Disc(markup, "unstable-rest", x, y, 5.6); break;
            case MarkKind.Saddle:
                markup.Empty("path", ("class", "saddle-rest"), ("d", Path($"M{x} {y - 7.5}L{x + 7.5} {y}L{x} {y + 7.5}L{x - 7.5} {y}Z")));
                Disc(markup, "dot", x, y, 2.2);
                break;
            case MarkKind.UndecidedRest:
                markup.Empty("path", ("class", "undecided-rest"), ("d", Path($"M{x} {y - 7}L{x + 7} {y + 5.5}H{x - 7}Z")));
                break;
            default:
                markup.Empty("path", ("class", "start"), ("d", Path($"M{x - 5} {y - 5}L{x + 5} {y + 5}M{x - 5} {y + 5}L{x + 5} {y - 5}")));
                break;
        }
    }

    /// <summary>An arrow head with its tip at a place, pointing along a direction.</summary>
    public static void Head(Markup markup, string kind, PlanePoint tip, double dx, double dy)
    {
        double length = Math.Sqrt(dx * dx + dy * dy);
        (dx, dy) = (dx / length, dy / length);
        double backX = tip.X - 9 * dx, backY = tip.Y - 9 * dy;
        string data = Path($"M{tip.X} {tip.Y}L{backX - 4.2 * dy} {backY + 4.2 * dx}L{backX + 4.2 * dy} {backY - 4.2 * dx}Z");
        markup.Empty("path", ("class", kind + " head"), ("d", data));
    }

    private static void Disc(Markup markup, string kind, double x, double y, double radius) => markup.Empty(
        "circle", ("class", kind), ("cx", Markup.Coordinate(x)), ("cy", Markup.Coordinate(y)), ("r", Markup.Coordinate(radius)));

    private static string Path(FormattableString data)
    {
        object?[] places = Array.ConvertAll(data.GetArguments(), static value => (object?)Markup.Coordinate((double)value!));
        return string.Format(System.Globalization.CultureInfo.InvariantCulture, data.Format, places);
    }
}
