using System.Text;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

/// <summary>A change to a text: at some place, some bytes go and others come.</summary>
public sealed record Mutation(int Place, int Removed, string Inserted);

public static class Mutations
{
    private static readonly string[] Fragments =
    [
        "", "0", "-", "1e400", "1e-320", "1e154", "null", "true", "[", "]", "{", "}", ",", ":", "\"", "\\", "\n", "[]", "{}", "[[", "]]",
        "\"radius\":", "\"region\":", "\"sweeps\":[[1]],", "7", "6.3", "\\ud800", "\u00e4", "\"Point\"", "\"Polygon\"", "\"LineString\"",
        "[0,0],", "[1e-12,0],", "\"\"", "e", ".", "\u0000",
    ];

    public static Arbitrary<Mutation[]> Of() => Arb.From(Gen.Choose(1, 4).SelectMany(n => (
        from place in Gen.Choose(0, 4000)
        from removed in Gen.Frequency((3, Gen.Constant(0)), (3, Gen.Choose(1, 3)), (1, Gen.Choose(4, 200)))
        from inserted in Gen.Elements(Fragments)
        select new Mutation(place, removed, inserted)).ArrayOf(n)));
}

public class SectionGeoJsonFuzzTests
{
    private static readonly byte[] Valid = Encoding.UTF8.GetBytes("""
        {"type":"FeatureCollection","metresPerUnit":0.001,"features":[
        {"type":"Feature","properties":{"region":"soil","boundaries":[["ground",null,"top",null]]},"geometry":{"type":"Polygon","coordinates":[[[-8,-8],[8,-8],[8,8],[-8,8],[-8,-8]]]}},
        {"type":"Feature","properties":{"region":"sheath","radius":3,"boundary":"rim"},"geometry":{"type":"Point","coordinates":[1.5,0.5]}},
        {"type":"Feature","properties":{"region":"screen","radius":1.5,"innerRadius":1,"innerBoundary":"inside"},"geometry":{"type":"Point","coordinates":[0,0]}},
        {"type":"Feature","properties":{"region":null,"sweeps":[[0,4,0]]},"geometry":{"type":"Polygon","coordinates":[[[-6,-6],[-5,-6],[-6.6536,-6.7568],[-6,-6]]]}},
        {"type":"Feature","properties":{"boundary":"foil","sweeps":[0,-3.14]},"geometry":{"type":"LineString","coordinates":[[-7,0],[-6,0],[-4,0]]}},
        {"type":"Feature","properties":{"name":"probe"},"geometry":{"type":"Point","coordinates":[7,-7]}}
        ]}
        """);

    [Fact]
    public void The_text_to_mutate_is_valid() =>
        Assert.Equal(3, SectionGeoJson.Parse(Encoding.UTF8.GetString(Valid)).Arrange().RegionNames.Length);

    [Property(Arbitrary = [typeof(Mutations)], MaxTest = 3000)]
    public void Only_the_typed_exceptions_escape(Mutation[] mutations)
    {
        List<byte> text = [.. Valid];
        foreach (Mutation mutation in mutations)
        {
            int place = mutation.Place % text.Count;
            text.RemoveRange(place, Math.Min(mutation.Removed, text.Count - place - 1));
            text.InsertRange(place, Encoding.UTF8.GetBytes(mutation.Inserted));
        }

        try
        {
            using MemoryStream stream = new([.. text]);
            CrossSection section = SectionGeoJson.Read(stream);
            _ = section.Arrange();
            Assert.Equal(section.Regions, SectionGeoJson.Parse(SectionGeoJson.ToText(section)).Regions);
        }
        catch (FemCoreException fault)
        {
            Assert.NotEmpty(fault.Message);
        }
    }
}
