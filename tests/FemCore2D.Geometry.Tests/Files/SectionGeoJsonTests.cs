using System.Text;

namespace FemCore2D.Geometry.Tests;

public class SectionGeoJsonTests
{
    private static CrossSection Sample => CrossSection.Empty
        .Fill(Outline.Rectangle(new Point2D(-8, -8), 16, 16, bottom: "ground", top: "cover"), "soil")
        .Fill(Outline.Circle(new Point2D(1.1, 0.3), 3, "sheath"), "filler \"grün\"")
        .Fill(Shape.Ring(Point2D.Origin, 1, 1.5, "screen inside", "screen outside"), "insulation")
        .Fill(Outline.RoundedRectangle(new Point2D(4, 4), 2, 1, 0.25), "duct")
        .Hole(Outline.Sector(new Point2D(-6, -6), 1.5, 0.2, 4).Named("void"))
        .Fill(Outline.Polygon(new(-6, 5), new(-3, 5), new(-5, 7)).Without(Outline.Circle(new Point2D(-5, 5.6), 0.2)), "duct")
        .Sheet(Outline.StartAt(new Point2D(-7, 0)).StraightTo(new Point2D(-6, 0), "half").ArcThrough(new(-5, 1), new(-4, 0)), "foil")
        .FixedPoint(new Point2D(7, -7), "probe");

    [Fact]
    public void A_section_in_metres_comes_back_as_it_was()
    {
        CrossSection back = SectionGeoJson.Parse(SectionGeoJson.ToText(Sample));
        Assert.Equal(SectionGeoJson.ToText(Sample), SectionGeoJson.ToText(back));
        Assert.Equal(Sample.Regions, back.Regions);
        Assert.Equal(Sample.Boundaries, back.Boundaries);
        Assert.Equal(Sample.Points, back.Points);
        Assert.Equal(Sample.Arrange().Pieces.Length, back.Arrange().Pieces.Length);

        // A circle is written by centre and radius, which its quarter points give back but for rounding.
        Assert.All(
            Sample.Arrange().Vertices.Zip(back.Arrange().Vertices),
            pair => Assert.True(pair.First.DistanceTo(pair.Second) < 2e-15, $"{pair.First} came back at {pair.Second}."));
    }

    [Fact]
    public void A_section_in_millimetres_comes_back_within_rounding()
    {
        CrossSection back = SectionGeoJson.Parse(SectionGeoJson.ToText(Sample, 0.001));
        foreach (string region in Sample.Regions)
        {
            Assert.Equal(Sample.AreaOf(region), back.AreaOf(region), 1e-12);
        }
    }

    [Fact]
    public void Circles_stay_circles_and_features_paint_in_order()
    {
        CrossSection section = SectionGeoJson.Parse("""
            {"type": "FeatureCollection", "metresPerUnit": 0.001, "features": [
              {"type": "Feature", "geometry": {"type": "Point", "coordinates": [1, 2]}, "properties": {"region": "outside", "radius": 5, "boundary": "rim"}},
              {"type": "Feature", "geometry": {"type": "Point", "coordinates": [1, 2]}, "properties": {"region": "inside", "radius": 2}},
              {"type": "Feature", "geometry": {"type": "Point", "coordinates": [1, 2]}, "properties": {"region": null, "radius": 1}}
            ]}
            """);
        Assert.Equal(21e-6 * Math.PI, section.AreaOf("outside"), 1e-18);
        Assert.Equal(3e-6 * Math.PI, section.AreaOf("inside"), 1e-18);
        Assert.Equal(10e-3 * Math.PI, section.LengthOf("rim"), 1e-15);
    }

    [Fact]
    public void Files_and_streams_are_read_and_written()
    {
        string path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName());
        try
        {
            SectionGeoJson.WriteFile(Sample, path);
            using MemoryStream stream = new();
            SectionGeoJson.Write(Sample, stream);
            Assert.Equal(File.ReadAllBytes(path), stream.ToArray());
            stream.Position = 0;
            Assert.Equal(SectionGeoJson.ToText(SectionGeoJson.ReadFile(path)), SectionGeoJson.ToText(SectionGeoJson.Read(stream)));
        }
        finally
        {
            File.Delete(path);
        }
    }

    [Fact]
    public void A_byte_order_mark_is_passed_over()
    {
        using MemoryStream stream = new([0xEF, 0xBB, 0xBF, .. Encoding.UTF8.GetBytes(SectionGeoJson.ToText(Sample))]);
        Assert.Equal(Sample.Regions, SectionGeoJson.Read(stream).Regions);
    }

    [Theory]
    [InlineData("", 1, "JSON")]
    [InlineData("{\n\"type\": \"FeatureCollection\",\n\"features\": [}\n}", 3, "JSON")]
    [InlineData("{\"type\": \"FeatureCollection\", \"features\": []} x", 1, "JSON")]
    [InlineData("[]", 1, "FeatureCollection")]
    [InlineData("{\"type\": \"Feature\"}", 1, "FeatureCollection")]
    [InlineData("{\"type\": \"FeatureCollection\"}", 1, "features")]
    [InlineData("{\"type\": \"FeatureCollection\", \"features\": 3}", 1, "no array")]
    [InlineData("{\"type\": \"FeatureCollection\", \"metresPerUnit\": 0, \"features\": []}", 1, "metresPerUnit")]
    [InlineData("{\"type\": \"FeatureCollection\", \"metresPerUnit\": 1e999, \"features\": []}", 1, "too large")]
    [InlineData("{\"type\": \"FeatureCollection\",\n\"type\": \"FeatureCollection\"}", 2, "two members")]
    [InlineData("{\"type\": \"FeatureCollection\", \"features\": [\n\n{\"type\": \"\\ud800\"}]}", 3, "Unicode")]
    public void A_malformed_collection_is_named_with_its_line(string text, long line, string cause) =>
        AssertMalformed(text, line, cause);

    [Theory]
    [InlineData("3", 4, "Feature")]
    [InlineData("{\"type\": \"Feature\", \"properties\": {}, \"geometry\": null}", 4, "geometry")]
    [InlineData("{\"type\": \"Feature\", \"properties\": 3,\n\"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}}", 4, "properties")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"coordinates\": [0, 0]}}", 4, "type")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\"}}", 4, "coordinates")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\",\n\"coordinates\": [0]}, \"properties\": {\"name\": \"p\"}}", 5, "position")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 1, 2]}, \"properties\": {\"name\": \"p\"}}", 4, "position")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, \"1\"]}, \"properties\": {\"name\": \"p\"}}", 4, "no number")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}}", 4, "name")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}, \"properties\": {\"region\": \"a\", \"radius\": -1}}", 4, "radius")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}, \"properties\": {\"region\": \" \", \"radius\": 1}}", 4, "blank")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}, \"properties\": {\"region\": \"a\", \"radius\": 1, \"innerRadius\": 1}}", 4, "larger")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Point\", \"coordinates\": [0, 0]}, \"properties\": {\"region\": \"a\", \"radius\": 1, \"innerBoundary\": \"b\"}}", 4, "innerRadius")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"MultiPolygon\", \"coordinates\": []}}", 4, "MultiPolygon")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"LineString\", \"coordinates\": [[0, 0], [1, 0]]}}", 4, "boundary")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"LineString\", \"coordinates\": [[0, 0]]}, \"properties\": {\"boundary\": \"b\"}}", 4, "two positions")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"LineString\", \"coordinates\": [[0, 0], [1, 0]]}, \"properties\": {\"boundary\": \"b\", \"sweeps\": [1, 2]}}", 4, "2 sweeps for 1 pieces")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Polygon\", \"coordinates\": []}}", 4, "no ring")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Polygon\", \"coordinates\": [[[0, 0], [1, 0], [1, 1]]]}}", 4, "open")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Polygon\", \"coordinates\": [[[0, 0], [1, 0], [0, 1], [1, 1], [0, 0]]]}}", 4, "crosses")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Polygon\", \"coordinates\": [[[0, 0], [1, 0], [1, 1], [0, 0]]]}, \"properties\": {\"boundary\": \"a\", \"boundaries\": [[null, \"a\", null]]}}", 4, "both")]
    [InlineData("{\"type\": \"Feature\", \"geometry\": {\"type\": \"Polygon\", \"coordinates\": [[[0, 0], [1, 0], [1, 1], [0, 0]]]}, \"properties\": {\"region\": \"soil\", \"boundary\": \"soil\"}}", 4, "'soil'")]
    public void A_malformed_feature_is_named_with_its_line(string feature, long line, string cause) =>
        AssertMalformed("{\n\"type\": \"FeatureCollection\",\n\"features\": [\n" + feature + "\n]}", line, cause);

    [Fact]
    public void Deep_nesting_and_large_texts_are_refused()
    {
        AssertMalformed(new string('[', 100_000), 1, "nested");
        AssertMalformed(new string(' ', SectionGeoJson.LargestLength + 1), 0, "longer");
        using EndlessStream endless = new();
        Assert.Throws<MalformedFileException>(() => SectionGeoJson.Read(endless));
    }

    private static void AssertMalformed(string text, long line, string cause)
    {
        MalformedFileException fault = Assert.Throws<MalformedFileException>(() => SectionGeoJson.Parse(text));
        Assert.Contains(cause, fault.Message, StringComparison.Ordinal);
        Assert.Equal(line, fault.Line);
    }

    private sealed class EndlessStream : MemoryStream
    {
        public override int Read(Span<byte> buffer)
        {
            buffer.Fill((byte)' ');
            return buffer.Length;
        }
    }
}
