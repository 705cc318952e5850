using System.Globalization;
using System.Text.Json;

namespace PartCheck.Reports;

/// <summary>How single values go into JSON: one place that keeps NaN, infinity and broken text out.</summary>
internal static class JsonValues
{
    /// <summary>Writes a number in SI; null, NaN and infinity become <c>null</c>, minus zero becomes 0.</summary>
    internal static void Real(this Utf8JsonWriter json, string name, double? value)
    {
        json.WritePropertyName(name);
        if (value is not { } number || !double.IsFinite(number))
        {
            json.WriteNullValue();
        }
        else
        {
            json.WriteNumberValue(number == 0 ? 0 : number);
        }
    }

    /// <summary>Writes a whole number or <c>null</c>.</summary>
    internal static void Whole(this Utf8JsonWriter json, string name, int? value)
    {
        json.WritePropertyName(name);
        if (value is { } number)
        {
            json.WriteNumberValue(number);
        }
        else
        {
            json.WriteNullValue();
        }
    }

    /// <summary>Writes a text or <c>null</c>.</summary>
    internal static void Text(this Utf8JsonWriter json, string name, string? value)
    {
        json.WritePropertyName(name);
        if (value is null)
        {
            json.WriteNullValue();
        }
        else
        {
            json.WriteStringValue(WholeCharacters(value));
        }
    }

    /// <summary>Writes a day as ISO 8601 does.</summary>
    internal static void Day(this Utf8JsonWriter json, string name, DateOnly day) =>
        json.WriteString(name, day.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture));

    /// <summary>Writes a list of texts.</summary>
    internal static void Texts(this Utf8JsonWriter json, string name, IEnumerable<string> values)
    {
        json.WriteStartArray(name);
        foreach (string value in values)
        {
            json.WriteStringValue(WholeCharacters(value));
        }

        json.WriteEndArray();
    }

    /// <summary>Writes a list of objects.</summary>
    internal static void List<T>(
        this Utf8JsonWriter json, string name, IEnumerable<T> items, Action<Utf8JsonWriter, T> write)
    {
        json.WriteStartArray(name);
        foreach (T item in items)
        {
            json.WriteStartObject();
            write(json, item);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    // Half of a surrogate pair (a damaged cell) has no UTF-8 form: the replacement character stands for it.
    private static string WholeCharacters(string text)
    {
        for (int i = 0; i < text.Length; i++)
        {
            if (char.IsSurrogate(text[i]))
            {
                return string.Concat(text.EnumerateRunes().Select(r => r.ToString()));
            }
        }

        return text;
    }
}
