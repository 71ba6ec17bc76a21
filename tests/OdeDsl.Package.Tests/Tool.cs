using System.Diagnostics;
using System.Text;

namespace OdeDsl.Package.Tests;

/// <summary>Runs a program and waits for it.</summary>
internal static class Tool
{
    // Far beyond what the slowest step takes on a loaded machine: a program that hangs must not hang the tests.
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(8);

    /// <returns>All that the program printed.</returns>
    /// <exception cref="InvalidOperationException">The program failed or took too long; with what it printed.</exception>
    public static string Run(string folder, IReadOnlyDictionary<string, string> environment, string program, params string[] arguments)
    {
        ProcessStartInfo start = new(program, arguments)
        {
            WorkingDirectory = folder,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            StandardOutputEncoding = Encoding.UTF8,
        };
        // The runner of these tests tells its own programs where to find things; others must look for themselves.
        foreach (string name in start.Environment.Keys.Where(static name => name.StartsWith("MSBUILD", StringComparison.OrdinalIgnoreCase)).ToArray())
            start.Environment.Remove(name);
        foreach ((string name, string value) in environment) start.Environment[name] = value;

        using Process process = Process.Start(start) ?? throw new InvalidOperationException($"'{program}' does not start.");
        Task<string> output = process.StandardOutput.ReadToEndAsync();
        Task<string> error = process.StandardError.ReadToEndAsync();
        bool ended = process.WaitForExit(Patience);
        if (!ended) process.Kill(entireProcessTree: true);
        string printed = output.Result + error.Result;
        if (ended && process.ExitCode == 0) return printed;
        string end = ended ? $"ended with {process.ExitCode}" : "did not end";
        throw new InvalidOperationException($"{program} {string.Join(' ', arguments)} {end}.\n{printed}");
    }
}
