namespace OdeDsl.Workbench.Hosting;

/// <summary>
/// Writes files whole or not at all: each is written under a temporary name beside its place and moved there when all are complete.
/// </summary>
internal static class WholeFiles
{
    /// <summary>Makes the folder if need be and makes sure that files can be written there, before long work begins.</summary>
    /// <exception cref="IOException">Nothing can be written there.</exception>
    /// <exception cref="UnauthorizedAccessException">Nothing may be written there.</exception>
    public static void Prepare(string folder)
    {
        if (File.Exists(folder)) throw new IOException($"'{folder}' is a file; a folder is needed.");
        try
        {
            Directory.CreateDirectory(folder);
        }
        catch (FileNotFoundException missing)
        {
            throw new IOException($"The folder '{folder}' cannot be made.", missing);
        }

        string probe = TemporaryName(Path.Combine(folder, "probe"));
        File.WriteAllBytes(probe, []);
        File.Delete(probe);
    }

    /// <summary>Writes all files or none.</summary>
    /// <param name="folder">The folder.</param>
    /// <param name="files">Names and contents.</param>
    /// <exception cref="IOException">A file cannot be written; none was replaced unless moving itself failed half way.</exception>
    /// <exception cref="UnauthorizedAccessException">A file may not be written.</exception>
    public static void Write(string folder, IReadOnlyList<(string Name, string Content)> files)
    {
        string[] temporary = [.. files.Select(file => TemporaryName(Path.Combine(folder, file.Name)))];
        try
        {
            for (int i = 0; i < files.Count; i++) File.WriteAllText(temporary[i], files[i].Content);
            for (int i = 0; i < files.Count; i++) File.Move(temporary[i], Path.Combine(folder, files[i].Name), overwrite: true);
        }
        finally
        {
            foreach (string name in temporary) File.Delete(name);
        }
    }

    // In the same folder, so that the move stays within one file system and is a mere renaming.
    private static string TemporaryName(string path) => $"{path}.{Guid.NewGuid():N}.tmp";
}
