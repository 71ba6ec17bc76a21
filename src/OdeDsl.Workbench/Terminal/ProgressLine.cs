using OdeDsl.Assessment;
using OdeDsl.Workbench.Hosting;

namespace OdeDsl.Workbench.Terminal;

/// <summary>One line on a terminal that says how far the work is and disappears at its end. Silent where nobody watches.</summary>
internal sealed class ProgressLine : IProgress<AssessmentProgress>, IDisposable
{
    // Often enough to look alive, seldom enough to cost nothing.
    private const long MinimumMilliseconds = 100;

    private const int Width = 78;

    private readonly Surroundings surroundings;
    private readonly string what;
    private readonly Lock gate = new();
    private long lastShown = long.MinValue;
    private bool isShown;

    public ProgressLine(Surroundings surroundings, string what)
    {
        this.surroundings = surroundings;
        this.what = what;
        Show($"{what} ...");
    }

    public void Report(AssessmentProgress value) => Show($"{what} {100 * value.Fraction,3:F0} % {value.Detail}");

    public void Dispose()
    {
        lock (gate)
        {
            if (isShown) surroundings.Error.Write("\r" + new string(' ', Width) + "\r");
            isShown = false;
        }
    }

    private void Show(string text)
    {
        if (!surroundings.ShowsProgress) return;
        lock (gate)
        {
            long now = Environment.TickCount64;
            if (isShown && now - lastShown < MinimumMilliseconds) return;
            lastShown = now;
            isShown = true;
            surroundings.Error.Write("\r" + (text.Length > Width ? text[..Width] : text.PadRight(Width)));
        }
    }
}
