using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class CurvedMapTests
{
    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    public void EdgeNodesLieOnTheArcAndBothCellsOfAnEdgeMeetThere(int degree)
    {
        foreach (Mesh mesh in new[] { TestMeshes.Disc(2), TestMeshes.QuarterRing(2), TwoCellsAtAnArc() })
        {
            CellMaps maps = new(mesh, degree);
            for (int edge = 0; edge < mesh.EdgeCount; edge++)
            {
                (int left, int right) = mesh.CellsOf(edge);
                for (int k = 0; k <= 4 * degree; k++)
                {
                    double fraction = k / (4.0 * degree);
                    Point2D onLeft = left < 0 ? default : maps.PlaceOnEdge(left, mesh.EdgesOf(left).IndexOf(edge), fraction);
                    Point2D onRight = right < 0 ? default : maps.PlaceOnEdge(right, mesh.EdgesOf(right).IndexOf(edge), 1 - fraction);
                    if (left >= 0 && right >= 0)
                    {
                        Assert.True(onLeft.DistanceTo(onRight) <= 1e-15);
                    }

                    if (mesh.SweepRadiansOf(edge) != 0 && k % 4 == 0)
                    {
                        (int from, _) = mesh.EndsOf(edge);
                        double radius = mesh.Vertices[from].DistanceTo(Point2D.Origin);
                        Assert.Equal(radius, (left >= 0 ? onLeft : onRight).DistanceTo(Point2D.Origin), 4e-16 * radius);
                    }
                }
            }
        }
    }

    [Property]
    public void ArcPointsDivideTheSweepEvenly(RandomPoint a, RandomPoint b, RandomPoint c)
    {
        double sweep = (a.U - 0.5) * 1.99 * Math.PI;
        if (sweep == 0)
        {
            return;
        }

        double radius = 0.1 + b.U;
        double start = 7 * b.V;
        Point2D At(double s) => Point2D.Origin + (radius * Vector2D.AtAngle(start + (s * sweep)));
        Vector2D rise = ArcPoint.Rise(At(1) - At(0), sweep, c.U);
        Assert.True((At(0).Towards(At(1), c.U) + rise).DistanceTo(At(c.U)) <= 1e-14);
    }

    [Property]
    public void JacobiansAgreeWithDifferencesOfTheMap(RandomPoint p)
    {
        foreach (CellMaps maps in CurvedMaps())
        {
            for (int cell = 0; cell < maps.Mesh.CellCount; cell++)
            {
                MapChecks.JacobianAgreesWithDifferences(maps, cell, p.In(maps.Mesh.KindOf(cell)), 1e-12);
            }
        }
    }

    [Property]
    public void TheInverseLeadsBack(RandomPoint p)
    {
        foreach (CellMaps maps in CurvedMaps())
        {
            for (int cell = 0; cell < maps.Mesh.CellCount; cell++)
            {
                Point2D at = p.In(maps.Mesh.KindOf(cell));
                Assert.True(maps.TryInvert(cell, maps.PlaceOf(cell, at), out Point2D back));
                Assert.True(back.DistanceTo(at) <= 1e-14);
            }
        }
    }

    [Theory]
    [InlineData(1, 2)]
    [InlineData(2, 4)]
    [InlineData(3, 4)]
    public void AreaAndPerimeterOfADiscConverge(int degree, int order)
    {
        // Nodes on the arc: the radius is missed by h^2 for chords, h^4 for parabolas and cubics.
        int[] rings = [4, 8, 16];
        CellMaps[] maps = [.. rings.Select(n => new CellMaps(TestMeshes.Disc(n), degree))];
        double[] areas = [.. maps.Select(MapChecks.Area)];
        double[] perimeters = [.. maps.Select(m => Math.Abs(Perimeter(m) - (2 * Math.PI)))];
        Assert.Equal(order, MapChecks.LastRate([.. areas.Select(a => Math.Abs(a - Math.PI))]), 0.1);
        Assert.Equal(order, MapChecks.LastRate(perimeters), 0.1);
        for (int i = 0; i < rings.Length; i++)
        {
            Assert.Equal(6 * rings[i] * SectorUnderPolynomial(degree, Math.PI / (6 * rings[i])), areas[i], 1e-13);
        }
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    public void AreaOfARingOfQuadrilateralsIsTheDifferenceOfItsSectors(int degree)
    {
        foreach (int n in new[] { 1, 2, 4 })
        {
            // Radii 2 and 1: the sectors scale with their squares, 4 - 1.
            double exact = 3 * n * SectorUnderPolynomial(degree, Math.PI / 4 / n);
            Assert.Equal(exact, MapChecks.Area(new CellMaps(TestMeshes.QuarterRing(n), degree)), 1e-14);
        }
    }

    [Theory]
    [InlineData(CellKind.Triangle, 2)]
    [InlineData(CellKind.Triangle, 3)]
    [InlineData(CellKind.Quadrilateral, 2)]
    [InlineData(CellKind.Quadrilateral, 3)]
    public void InterpolationInCurvedCellsConvergesAtTheOptimalRates(CellKind kind, int degree)
    {
        (double Value, double Slope)[] errors = [.. new[] { 8, 16, 32 }.Select(n =>
            InterpolationError(new CellMaps(kind == CellKind.Triangle ? TestMeshes.Disc(n) : TestMeshes.QuarterRing(n), degree)))];
        double valueRate = MapChecks.LastRate([.. errors.Select(e => e.Value)]);
        double slopeRate = MapChecks.LastRate([.. errors.Select(e => e.Slope)]);
        Assert.True(valueRate > degree + 0.85, $"values: {valueRate}");
        Assert.True(slopeRate > degree - 0.15, $"gradients: {slopeRate}");
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void OuterNormalsCloseAroundEachCellAndGiveItsArea(int degree)
    {
        EdgeRule rule = EdgeRule.For(11);
        foreach (Mesh mesh in new[] { TestMeshes.Disc(2), TestMeshes.QuarterRing(2) })
        {
            CellMaps maps = new(mesh, degree);
            for (int cell = 0; cell < mesh.CellCount; cell++)
            {
                Vector2D sum = default;
                double area = 0;
                for (int edge = 0; edge < mesh.EdgesOf(cell).Length; edge++)
                {
                    for (int q = 0; q < rule.Count; q++)
                    {
                        double t = rule.Parameters[q];
                        Vector2D normal = maps.TangentOnEdge(cell, edge, t).Length * maps.OuterNormalOnEdge(cell, edge, t);
                        sum += rule.Weights[q] * normal;
                        area += rule.Weights[q] * (maps.PlaceOnEdge(cell, edge, t) - Point2D.Origin).Dot(normal) / 2;
                    }
                }

                Assert.True(sum.Length <= 1e-14);
                Assert.Equal(MapChecks.AreaOf(maps, cell), area, 1e-14);
            }
        }
    }

    [Fact]
    public void OnlyCellsAtArcsBendAndOnlyFromDegreeTwoOn()
    {
        Mesh mesh = TestMeshes.Disc(3);
        CellMaps straight = new(mesh, 1);
        CellMaps bent = new(mesh, 2);
        Assert.Equal(2, bent.Degree);
        Assert.Same(mesh, bent.Mesh);
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            bool atArc = mesh.EdgesOf(cell).ToArray().Any(e => mesh.SweepRadiansOf(e) != 0);
            Assert.False(straight.IsCurved(cell));
            Assert.True(straight.IsAffine(cell));
            Assert.Equal(atArc, bent.IsCurved(cell));
            Assert.Equal(!atArc, bent.IsAffine(cell));
        }
    }

    private static IEnumerable<CellMaps> CurvedMaps() =>
        from degree in new[] { 2, 3 }
        from mesh in new[] { TestMeshes.Disc(1), TestMeshes.QuarterRing(1) }
        select new CellMaps(mesh, degree);

    /// <summary>A triangle inside and a quadrilateral outside the same arc, whose edge runs against the arc's sense.</summary>
    private static Mesh TwoCellsAtAnArc()
    {
        Point2D end = Point2D.Origin + Vector2D.AtAngle(0.8);
        Point2D start = Point2D.Origin + Vector2D.AtAngle(0);
        return TestMeshes.OfCells(
            [end, start, new(0, 0), new(2, 0.1), new(1.3, 1.5)],
            [2, 1, 0],
            [0, 1, 3, 4],
            new MarkedEdge(1, 0, 0.8, -1));
    }

    /// <summary>
    /// The area between the centre and the polynomial through equally spaced points of an arc of radius 1 from -phi to
    /// phi, integrated by hand: half the integral of x dy - y dx.
    /// </summary>
    private static double SectorUnderPolynomial(int degree, double phi)
    {
        (double sine, double cosine) = Math.SinCos(phi);
        (double thirdSine, double thirdCosine) = Math.SinCos(phi / 3);

        // x = a - b u^2, y = c u + d u^3 for u from -1 to 1.
        double b = degree == 1 ? 0 : degree == 2 ? 1 - cosine : (thirdCosine - cosine) * 9 / 8;
        double a = cosine + b;
        double c = degree < 3 ? sine : ((27 * thirdSine) - sine) / 8;
        double d = sine - c;
        return (a * c) + (a * d) + (b * c / 3) - (b * d / 5);
    }

    private static double Perimeter(CellMaps maps)
    {
        double length = 0;
        for (int edge = 0; edge < maps.Mesh.EdgeCount; edge++)
        {
            length += maps.Mesh.IsOuter(edge) ? maps.LengthOf(edge) : 0;
        }

        return length;
    }

    /// <summary>The largest error of interpolating a smooth function, and of its gradient, over all curved cells.</summary>
    private static (double Value, double Slope) InterpolationError(CellMaps maps)
    {
        (double worst, double worstSlope) = (0, 0);
        for (int cell = 0; cell < maps.Mesh.CellCount; cell++)
        {
            if (!maps.IsCurved(cell))
            {
                continue;
            }

            CellKind kind = maps.Mesh.KindOf(cell);
            INodeElement element = NodeElement.Lagrange(kind, maps.Degree);
            ShapeTable table = new(element, QuadratureRule.For(kind, 6));
            double[] nodal = [.. element.NodePoints.ToArray().Select(n => Function(maps.PlaceOf(cell, n)))];
            for (int q = 0; q < table.PointCount; q++)
            {
                double value = 0;
                Vector2D slope = default;
                for (int i = 0; i < nodal.Length; i++)
                {
                    value += nodal[i] * table.ValuesAt(q)[i];
                    slope += nodal[i] * table.GradientsAt(q)[i];
                }

                Point2D place = maps.PlaceOf(cell, table.Rule.Points[q]);
                Vector2D real = maps.JacobianAt(cell, table.Rule.Points[q]).ToRealGradient(slope);
                worst = Math.Max(worst, Math.Abs(value - Function(place)));
                worstSlope = Math.Max(worstSlope, (real - Gradient(place)).Length);
            }
        }

        return (worst, worstSlope);

        static double Function(Point2D p) => Math.Sin(2 * p.X) * Math.Exp(p.Y);

        static Vector2D Gradient(Point2D p) =>
            Math.Exp(p.Y) * new Vector2D(2 * Math.Cos(2 * p.X), Math.Sin(2 * p.X));
    }
}
