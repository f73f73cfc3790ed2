using System.Text.Json;
using System.Text.Json.Serialization;

namespace ChainSolve.Tests.Shared.Checks;

/// <summary>A move between two states by name, written as <c>["up", "down", 0.001]</c>.</summary>
[JsonConverter(typeof(Converter))]
internal sealed record CheckMove(string From, string To, double Rate)
{
    private sealed class Converter : JsonConverter<CheckMove>
    {
        public override CheckMove Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options)
        {
            var parts = JsonElement.ParseValue(ref reader);
            return new CheckMove(parts[0].GetString()!, parts[1].GetString()!, parts[2].GetDouble());
        }

        public override void Write(Utf8JsonWriter writer, CheckMove value, JsonSerializerOptions options) =>
            throw new NotSupportedException("Checks are read only.");
    }
}
