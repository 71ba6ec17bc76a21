using System.Text;
using System.Text.Json;
using OdeDsl.Assessment;
using OdeDsl.Workbench.Report;

namespace OdeDsl.Workbench.Hosting;

/// <summary>The assessments of all models as one JSON text, for other programs.</summary>
internal static class AssessmentFile
{
    // Raised whenever a property is renamed, removed or changes its meaning. Each assessment carries a schema number of its own.
    private const int Schema = 1;

    public static string Write(IReadOnlyList<ModelReport> models, Provenance provenance)
    {
        using MemoryStream stream = new();
        using (Utf8JsonWriter writer = new(stream, new JsonWriterOptions { Indented = true }))
        {
            writer.WriteStartObject();
            writer.WriteNumber("schema", Schema);
            writer.WriteString("version", Provenance.Version);
            writer.WriteString("made", provenance.Made.UtcDateTime);
            writer.WriteString("machine", Provenance.Machine);
            writer.WriteNumber("seed", provenance.Seed);
            writer.WriteStartArray("assessments");
            foreach (ModelReport model in models)
            {
                if (model.Assessment is { } assessment) WriteIndented(writer, assessment.ToJson());
            }

            writer.WriteEndArray();
            writer.WriteStartArray("failures");
            foreach (ModelReport model in models.Where(static model => model.Assessment is null))
            {
                writer.WriteStartObject();
                writer.WriteString("model", model.Description.Name);
                writer.WriteString("reason", model.Failure);
                writer.WriteEndObject();
            }

            writer.WriteEndArray();
            writer.WriteEndObject();
        }

        return Encoding.UTF8.GetString(stream.GetBuffer(), 0, (int)stream.Length) + "\n";
    }

    private static void WriteIndented(Utf8JsonWriter writer, string json)
    {
        using JsonDocument document = JsonDocument.Parse(json);
        document.RootElement.WriteTo(writer);
    }
}
