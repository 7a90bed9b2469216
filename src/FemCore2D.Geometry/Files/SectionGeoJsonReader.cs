using System.Text.Json;

namespace FemCore2D.Geometry;

/// <summary>Builds the cross-section that a parsed GeoJSON text describes.</summary>
internal sealed class SectionGeoJsonReader(JsonItem root)
{
    private double metresPerUnit = 1;
    private CrossSection section = CrossSection.Empty;

    public CrossSection Read()
    {
        if (root.Kind != JsonTokenType.StartObject || root.Member("type")?.Text != "FeatureCollection")
        {
            throw new MalformedFileException(
                "the text is no object of type FeatureCollection. Put the features into one.", root.Line);
        }

        if (root.Member("metresPerUnit") is JsonItem unit)
        {
            metresPerUnit = Number(unit, "metresPerUnit");
            if (metresPerUnit <= 0)
            {
                throw new MalformedFileException("metresPerUnit is not positive. Write 0.001 for millimetres.", unit.Line);
            }
        }

        JsonItem features = root.Member("features")
            ?? throw new MalformedFileException("the FeatureCollection has no member features. Add it.", root.Line);
        foreach (JsonItem feature in Array(features, "features"))
        {
            try
            {
                Draw(feature);
            }
            catch (Exception fault) when (fault is InvalidSectionException or ArgumentException)
            {
                throw new MalformedFileException($"the feature cannot be drawn. {fault.Message}", feature.Line, fault);
            }
        }

        return section;
    }

    private void Draw(JsonItem feature)
    {
        if (feature.Kind != JsonTokenType.StartObject || feature.Member("type")?.Text != "Feature")
        {
            throw new MalformedFileException("the features hold something that is no object of type Feature.", feature.Line);
        }

        JsonItem geometry = Object(feature.Member("geometry"), "geometry", feature);
        JsonItem? properties = feature.Member("properties");
        if (properties is not null)
        {
            Object(properties, "properties", feature);
        }

        properties ??= feature;
        JsonItem type = geometry.Member("type")
            ?? throw new MalformedFileException("the geometry has no type.", geometry.Line);
        JsonItem coordinates = geometry.Member("coordinates")
            ?? throw new MalformedFileException("the geometry has no coordinates.", geometry.Line);
        FeatureText text = new(
            ReferenceEquals(properties, feature) ? null : properties, coordinates, feature.Line);
        switch (type.Text)
        {
            case "Point" when text.Property("radius") is not null:
                Paint(Circle(text), text);
                break;
            case "Point":
                section = section.FixedPoint(Position(coordinates), text.Required("name", "a Point without a radius, which is a fixed point"));
                break;
            case "LineString":
                section = section.Sheet(Chain(coordinates, text.Property("sweeps"), text.Property("boundaries"), null), text.Required("boundary", "a LineString, which is a sheet"));
                break;
            case "Polygon":
                Paint(Polygon(text), text);
                break;
            default:
                throw new MalformedFileException(
                    $"the geometry type '{type.Text}' is not read. Use Point, LineString and Polygon, one a feature.", type.Line);
        }
    }

    private void Paint(Shape shape, FeatureText text) =>
        section = text.Name("region") is string region ? section.Fill(shape, region) : section.Hole(shape);

    private Shape Circle(FeatureText text)
    {
        Point2D centre = Position(text.Coordinates);
        double radius = metresPerUnit * Number(text.Property("radius")!, "radius");
        string? boundary = text.Name("boundary");
        string? innerBoundary = text.Name("innerBoundary");
        if (text.Property("innerRadius") is JsonItem inner)
        {
            return Shape.Ring(centre, metresPerUnit * Number(inner, "innerRadius"), radius, innerBoundary, boundary);
        }

        return innerBoundary is null
            ? Shape.Inside(Outline.Circle(centre, radius, boundary))
            : throw new MalformedFileException(
                "the circle has an innerBoundary but no innerRadius. Add the radius, or leave the boundary out.", text.Line);
    }

    private Shape Polygon(FeatureText text)
    {
        List<JsonItem> rings = Array(text.Coordinates, "coordinates");
        if (rings.Count == 0)
        {
            throw new MalformedFileException("the Polygon has no ring.", text.Coordinates.Line);
        }

        List<JsonItem>? sweeps = PerRing(text.Property("sweeps"), "sweeps", rings.Count);
        List<JsonItem>? boundaries = PerRing(text.Property("boundaries"), "boundaries", rings.Count);
        string? boundary = text.Name("boundary");
        if (boundary is not null && boundaries is not null)
        {
            throw new MalformedFileException("the feature has both boundary and boundaries. Keep one.", text.Line);
        }

        List<Outline> outlines = [];
        for (int i = 0; i < rings.Count; i++)
        {
            OutlinePath path = Chain(rings[i], sweeps?[i], boundaries?[i], boundary);
            if (path.Start != path.End)
            {
                throw new MalformedFileException(
                    $"the ring is open: it begins at {path.Start} and ends at {path.End}. "
                    + "Repeat its first position at its end.",
                    rings[i].Line);
            }

            outlines.Add(path.Close());
        }

        return outlines[0].Without([.. outlines.Skip(1)]);
    }

    private OutlinePath Chain(JsonItem coordinates, JsonItem? sweeps, JsonItem? boundaries, string? boundary)
    {
        List<JsonItem> positions = Array(coordinates, "coordinates");
        if (positions.Count < 2)
        {
            throw new MalformedFileException("the line has fewer than two positions.", coordinates.Line);
        }

        List<JsonItem>? angles = PerPiece(sweeps, "sweeps", positions.Count - 1);
        List<JsonItem>? names = PerPiece(boundaries, "boundaries", positions.Count - 1);
        OutlinePath path = Outline.StartAt(Position(positions[0]));
        for (int i = 1; i < positions.Count; i++)
        {
            double sweep = angles is null ? 0 : Number(angles[i - 1], "a sweep");
            string? name = names is null ? boundary : FeatureText.NameOf(names[i - 1], "a boundary");
            path = path.ArcTo(Position(positions[i]), sweep, name);
        }

        return path;
    }

    private Point2D Position(JsonItem item)
    {
        List<JsonItem> numbers = Array(item, "a position");
        if (numbers.Count != 2)
        {
            throw new MalformedFileException($"a position has {numbers.Count} numbers, but the plane has two.", item.Line);
        }

        return new Point2D(
            metresPerUnit * Number(numbers[0], "a coordinate"), metresPerUnit * Number(numbers[1], "a coordinate"));
    }

    private static List<JsonItem>? PerRing(JsonItem? item, string what, int count) =>
        item is null ? null : Counted(Array(item, what), what, "rings", count, item.Line);

    private static List<JsonItem>? PerPiece(JsonItem? item, string what, int count) =>
        item is null ? null : Counted(Array(item, what), what, "pieces", count, item.Line);

    private static List<JsonItem> Counted(List<JsonItem> items, string what, string per, int count, long line) =>
        items.Count == count
            ? items
            : throw new MalformedFileException($"there are {items.Count} {what} for {count} {per}. Give one for each.", line);

    private static JsonItem Object(JsonItem? item, string what, JsonItem parent) => item?.Kind == JsonTokenType.StartObject
        ? item
        : throw new MalformedFileException($"the feature has no object {what}.", (item ?? parent).Line);

    private static List<JsonItem> Array(JsonItem item, string what) => item.Kind == JsonTokenType.StartArray
        ? item.Items
        : throw new MalformedFileException($"{what} is no array.", item.Line);

    private static double Number(JsonItem item, string what) => item.Kind == JsonTokenType.Number
        ? item.Number
        : throw new MalformedFileException($"{what} is no number.", item.Line);

    /// <summary>The parts of a feature that say what to draw.</summary>
    private readonly record struct FeatureText(JsonItem? Properties, JsonItem Coordinates, long Line)
    {
        public JsonItem? Property(string name) => Properties?.Member(name);

        public string? Name(string property) => Property(property) is JsonItem item ? NameOf(item, property) : null;

        public string Required(string property, string what) => Name(property)
            ?? throw new MalformedFileException($"{what}, needs the property {property}.", Line);

        public static string? NameOf(JsonItem item, string what) => item.Kind switch
        {
            JsonTokenType.Null => null,
            JsonTokenType.String when !string.IsNullOrWhiteSpace(item.Text) => item.Text,
            _ => throw new MalformedFileException($"{what} is no name: a string that is not blank.", item.Line),
        };
    }
}
