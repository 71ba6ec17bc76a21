using System.Text.Json;
using System.Text.Json.Serialization;

namespace OdeDsl.Assessment;

/// <summary>Writes numbers that JSON cannot hold (infinities, NaN) as null, and reads null as NaN.</summary>
internal sealed class FiniteNumberConverter : JsonConverter<double>
{
    /// <inheritdoc/>
    public override bool HandleNull => true;

    /// <inheritdoc/>
    public override double Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
        reader.TokenType == JsonTokenType.Null ? double.NaN : reader.GetDouble();

    /// <inheritdoc/>
    public override void Write(Utf8JsonWriter writer, double value, JsonSerializerOptions options)
    {
        if (double.IsFinite(value)) writer.WriteNumberValue(value);
        else writer.WriteNullValue();
    }
}
