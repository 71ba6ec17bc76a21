namespace OdeDsl.Workbench.Hosting;

/// <summary>What a program touches outside itself: so that tests can stand in for it.</summary>
/// <param name="Output">Results for people.</param>
/// <param name="Error">Complaints and progress.</param>
/// <param name="ShowsProgress">Whether somebody watches the progress: a terminal, not a pipe.</param>
/// <param name="IsTerminal">Whether the output is a terminal that knows its width and colours.</param>
/// <param name="Clock">The time.</param>
internal sealed record Surroundings(TextWriter Output, TextWriter Error, bool ShowsProgress, bool IsTerminal, TimeProvider Clock)
{
    public static Surroundings OfProcess() => new(
        Console.Out, Console.Error, !Console.IsErrorRedirected && !Console.IsOutputRedirected, !Console.IsOutputRedirected, TimeProvider.System);
}
