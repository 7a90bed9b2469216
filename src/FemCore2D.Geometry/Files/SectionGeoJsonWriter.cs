using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace FemCore2D.Geometry;

/// <summary>Writes the items of a cross-section as GeoJSON features.</summary>
internal sealed class SectionGeoJsonWriter(Utf8JsonWriter json, double metresPerUnit)
{
    public static byte[] Write(CrossSection section, double metresPerUnit)
    {
        ArgumentNullException.ThrowIfNull(section);
        if (!(metresPerUnit > 0 && double.IsFinite(metresPerUnit)))
        {
            throw new ArgumentOutOfRangeException(
                nameof(metresPerUnit), metresPerUnit, "The unit of a file needs a positive, finite length. "
                    + "Use 0.001 for millimetres.");
        }

        // One feature a line: short enough to read, and a change shows as the lines that it touches.
        using MemoryStream stream = new();
        using Utf8JsonWriter json = new(stream, new JsonWriterOptions { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });
        SectionGeoJsonWriter writer = new(json, metresPerUnit);
        stream.Write(Encoding.UTF8.GetBytes(string.Create(
            CultureInfo.InvariantCulture, $"{{\n\"type\": \"FeatureCollection\",\n\"metresPerUnit\": {metresPerUnit:R},\n\"features\": [")));
        string separator = "\n";
        foreach (SectionItem item in section.Items)
        {
            stream.Write(Encoding.UTF8.GetBytes(separator));
            separator = ",\n";
            writer.WriteFeature(item);
            json.Flush();
            json.Reset();
        }

        stream.Write("\n]\n}\n"u8);
        return stream.ToArray();
    }

    private void WriteFeature(SectionItem item)
    {
        json.WriteStartObject();
        json.WriteString("type", "Feature");
        json.WriteStartObject("properties");
        switch (item)
        {
            case PaintedShape painted:
                WriteShape(painted);
                break;
            case SheetLine sheet:
                json.WriteString("boundary", sheet.Boundary);
                WritePieces([sheet.Pieces], isPolygon: false);
                break;
            case NamedPoint point:
                json.WriteString("name", point.Name);
                EndProperties("Point");
                WritePosition(point.Place);
                break;
        }

        json.WriteEndObject();
        json.WriteEndObject();
    }

    private void WriteShape(PaintedShape painted)
    {
        json.WriteString("region", painted.Region);
        Shape shape = painted.Shape;
        if (RoundOutline.TryFrom(shape.Outer) is not RoundOutline outer)
        {
            WritePieces([.. shape.Outlines.Select(o => o.Pieces)], isPolygon: true);
        }
        else if (shape.Holes.IsEmpty)
        {
            WriteCircle(outer, null);
        }
        else if (shape.Holes.Length == 1 && RoundOutline.TryFrom(shape.Holes[0]) is RoundOutline inner && inner.Centre == outer.Centre)
        {
            WriteCircle(outer, inner);
        }
        else
        {
            WritePieces([.. shape.Outlines.Select(o => o.Pieces)], isPolygon: true);
        }
    }

    private void WriteCircle(RoundOutline outer, RoundOutline? inner)
    {
        json.WriteNumber("radius", outer.Radius / metresPerUnit);
        WriteName("boundary", outer.Boundary);
        if (inner is RoundOutline ring)
        {
            json.WriteNumber("innerRadius", ring.Radius / metresPerUnit);
            WriteName("innerBoundary", ring.Boundary);
        }

        EndProperties("Point");
        WritePosition(outer.Centre);
    }

    private void WritePieces(ImmutableArray<ImmutableArray<OutlinePiece>> rings, bool isPolygon)
    {
        OutlinePiece[] all = [.. rings.SelectMany(r => r)];
        if (isPolygon && all.All(p => p.Boundary == all[0].Boundary))
        {
            WriteName("boundary", all[0].Boundary);
        }
        else if (all.Any(p => p.Boundary is not null))
        {
            WritePerPiece("boundaries", rings, isPolygon, p => json.WriteStringValue(p.Boundary));
        }

        if (all.Any(p => !p.IsStraight))
        {
            WritePerPiece("sweeps", rings, isPolygon, p => json.WriteNumberValue(p.SweepRadians));
        }

        EndProperties(isPolygon ? "Polygon" : "LineString");
        Nest(isPolygon, json.WriteStartArray);
        foreach (ImmutableArray<OutlinePiece> ring in rings)
        {
            json.WriteStartArray();
            WritePosition(ring[0].Start);
            foreach (OutlinePiece piece in ring)
            {
                WritePosition(piece.End);
            }

            json.WriteEndArray();
        }

        Nest(isPolygon, json.WriteEndArray);
    }

    private void WritePerPiece(
        string name, ImmutableArray<ImmutableArray<OutlinePiece>> rings, bool isPolygon, Action<OutlinePiece> write)
    {
        json.WritePropertyName(name);
        Nest(isPolygon, json.WriteStartArray);
        foreach (ImmutableArray<OutlinePiece> ring in rings)
        {
            json.WriteStartArray();
            foreach (OutlinePiece piece in ring)
            {
                write(piece);
            }

            json.WriteEndArray();
        }

        Nest(isPolygon, json.WriteEndArray);
    }

    private void EndProperties(string geometryType)
    {
        json.WriteEndObject();
        json.WriteStartObject("geometry");
        json.WriteString("type", geometryType);
        json.WritePropertyName("coordinates");
    }

    private void WritePosition(Point2D place)
    {
        json.WriteStartArray();
        json.WriteNumberValue(place.X / metresPerUnit);
        json.WriteNumberValue(place.Y / metresPerUnit);
        json.WriteEndArray();
    }

    private void WriteName(string property, string? name)
    {
        if (name is not null)
        {
            json.WriteString(property, name);
        }
    }

    private static void Nest(bool isPolygon, Action bracket)
    {
        if (isPolygon)
        {
            bracket();
        }
    }

    /// <summary>An outline that is a circle with its quarter points on the axes, as <see cref="Outline.Circle"/> draws it.</summary>
    private readonly record struct RoundOutline(Point2D Centre, double Radius, string? Boundary)
    {
        public static RoundOutline? TryFrom(Outline outline)
        {
            ImmutableArray<OutlinePiece> pieces = outline.Pieces;
            if (pieces.Length != 4
                || pieces.Any(p => p.SweepRadians != pieces[0].SweepRadians || p.Boundary != pieces[0].Boundary)
                || Math.Abs(pieces[0].SweepRadians) != Math.PI / 2)
            {
                return null;
            }

            Box2D bounds = Box2D.Around(pieces[0].Start, pieces[2].Start).Union(Box2D.Around(pieces[1].Start, pieces[3].Start));
            Point2D centre = bounds.Centre;
            double radius = 0.5 * bounds.Width;
            double rounding = 8e-16 * (Math.Abs(centre.X) + Math.Abs(centre.Y) + radius);
            bool isOnAxes = pieces.All(p =>
                Math.Abs(Math.Abs(p.Start.X - centre.X) + Math.Abs(p.Start.Y - centre.Y) - radius) <= rounding);
            return isOnAxes ? new RoundOutline(centre, radius, pieces[0].Boundary) : null;
        }
    }
}
