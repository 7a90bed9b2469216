using System.Text.Json;

namespace FemCore2D.Geometry;

/// <summary>A value of a JSON text (RFC 8259) that remembers its line, for messages about what it means.</summary>
internal sealed class JsonItem
{
    private JsonItem(JsonTokenType kind, long line)
    {
        Kind = kind;
        Line = line;
    }

    /// <summary>The token that begins the value.</summary>
    public JsonTokenType Kind { get; }

    /// <summary>The line on which the value begins, counted from 1.</summary>
    public long Line { get; }

    public double Number { get; private init; }

    public string Text { get; private init; } = "";

    /// <summary>The values of an array.</summary>
    public List<JsonItem> Items { get; } = [];

    /// <summary>The members of an object.</summary>
    public Dictionary<string, JsonItem> Members { get; } = new(StringComparer.Ordinal);

    public bool IsNull => Kind == JsonTokenType.Null;

    /// <summary>Reads a whole text.</summary>
    /// <exception cref="MalformedFileException">The text is no JSON, is nested too deeply, or an object has two members of one name.</exception>
    public static JsonItem Read(ReadOnlySpan<byte> utf8, int deepestNesting)
    {
        Utf8JsonReader reader = new(utf8, new JsonReaderOptions { MaxDepth = deepestNesting });
        LineCounter lines = default;
        try
        {
            reader.Read();
            JsonItem root = ReadValue(ref reader, ref lines, utf8);

            // Asks for the end of the text, so that anything after the value is a fault too.
            reader.Read();
            return root;
        }
        catch (JsonException fault)
        {
            throw new MalformedFileException(
                "the text does not follow JSON (RFC 8259), is nested too deeply, or ends too early.", (fault.LineNumber ?? -1) + 1, fault);
        }
        catch (InvalidOperationException fault)
        {
            long line = lines.LineAt(utf8, reader.TokenStartIndex);
            throw new MalformedFileException("the string is not valid Unicode. Write the file as UTF-8.", line, fault);
        }
    }

    /// <summary>The member of an object, or <see langword="null"/> when it is absent or null.</summary>
    public JsonItem? Member(string name) => Members.TryGetValue(name, out JsonItem? member) && !member.IsNull ? member : null;

    private static JsonItem ReadValue(ref Utf8JsonReader reader, ref LineCounter lines, ReadOnlySpan<byte> utf8)
    {
        long line = lines.LineAt(utf8, reader.TokenStartIndex);
        JsonItem item;
        switch (reader.TokenType)
        {
            case JsonTokenType.StartObject:
                item = new JsonItem(JsonTokenType.StartObject, line);
                while (reader.Read() && reader.TokenType != JsonTokenType.EndObject)
                {
                    string name = reader.GetString()!;
                    reader.Read();
                    JsonItem member = ReadValue(ref reader, ref lines, utf8);
                    if (!item.Members.TryAdd(name, member))
                    {
                        throw new MalformedFileException($"the object has two members '{name}'. Keep one.", member.Line);
                    }
                }

                return item;
            case JsonTokenType.StartArray:
                item = new JsonItem(JsonTokenType.StartArray, line);
                while (reader.Read() && reader.TokenType != JsonTokenType.EndArray)
                {
                    item.Items.Add(ReadValue(ref reader, ref lines, utf8));
                }

                return item;
            case JsonTokenType.Number:
                double number = reader.GetDouble();
                return double.IsFinite(number)
                    ? new JsonItem(JsonTokenType.Number, line) { Number = number }
                    : throw new MalformedFileException("the number is too large for double precision.", line);
            case JsonTokenType.String:
                return new JsonItem(JsonTokenType.String, line) { Text = reader.GetString()! };
            default:
                return new JsonItem(reader.TokenType, line);
        }
    }

    /// <summary>Counts line ends up to places that are asked for in rising order.</summary>
    private struct LineCounter
    {
        private int counted;
        private long ends;

        public long LineAt(ReadOnlySpan<byte> utf8, long place)
        {
            ends += utf8[counted..(int)place].Count((byte)'\n');
            counted = (int)place;
            return ends + 1;
        }
    }
}
