using System.Globalization;
using System.Reflection;
using System.Runtime.InteropServices;

namespace OdeDsl.Workbench.Report;

/// <summary>Where a report comes from: what it takes to make it again.</summary>
/// <param name="Made">When it was made.</param>
/// <param name="Seed">The seed of all sampling.</param>
/// <param name="SampledStarts">The number of sampled starts of each model.</param>
/// <param name="WantedError">The accuracy asked of the recommended method, relative to each state's range.</param>
internal sealed record Provenance(DateTimeOffset Made, int Seed, int SampledStarts, double WantedError)
{
    /// <summary>The version of this library.</summary>
    public static string Version { get; } =
        (typeof(Provenance).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "unknown").Split('+')[0];

    /// <summary>The runtime and the kind of machine.</summary>
    public static string Machine { get; } = string.Create(
        CultureInfo.InvariantCulture,
        $"{RuntimeInformation.FrameworkDescription}, {RuntimeInformation.OSDescription.Split(' ')[0]} {RuntimeInformation.ProcessArchitecture}, {Environment.ProcessorCount} processors");

    public string MadeText => Made.UtcDateTime.ToString("yyyy-MM-dd HH:mm 'UTC'", CultureInfo.InvariantCulture);
}
