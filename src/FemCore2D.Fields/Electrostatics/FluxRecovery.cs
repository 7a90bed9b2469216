using FemCore2D.Assembly;
using FemCore2D.Elements;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>Estimates the error of a field from a smoothed flux density.</summary>
/// <remarks>
/// Zienkiewicz and Zhu 1987: within each region the flux density is averaged at the nodes over the cells that share
/// them; its distance from the one computed stands for the error. The average never mixes regions, across whose
/// boundaries the flux density jumps for good reason.
/// </remarks>
internal static class FluxRecovery
{
    private const int MostNodes = 32;

    public static double RelativeError(ElectrostaticSetup setup, NodeField<double> potential)
    {
        bool[] conducting = setup.ConductingRegions();
        double error = 0;
        double energy = 0;
        for (int region = 0; region < conducting.Length; region++)
        {
            if (!conducting[region])
            {
                string name = setup.Mesh.RegionNames[region];
                AddRegion(setup, potential, name, setup.Dielectrics[name], ref error, ref energy);
            }
        }

        return energy > 0 ? Math.Sqrt(error / energy) : 0;
    }

    private static void AddRegion(
        ElectrostaticSetup setup,
        NodeField<double> potential,
        string region,
        Permittivity permittivity,
        ref double error,
        ref double energy)
    {
        NodeSpace space = potential.Space;
        Vector2D[] averages = Averages(potential, region, permittivity);
        Span<int> unknowns = stackalloc int[MostNodes];
        Span<double> shapes = stackalloc double[MostNodes];
        foreach (int cell in setup.Mesh.CellsIn(region))
        {
            CellKind kind = setup.Mesh.KindOf(cell);
            INodeElement element = space.ElementOn(kind);
            var rule = QuadratureRule.For(kind, 2 * space.Degree);
            int count = space.Numbering.CellUnknowns(cell, unknowns);
            for (int q = 0; q < rule.Points.Length; q++)
            {
                Point2D reference = rule.Points[q];
                Point2D place = space.Maps.PlaceOf(cell, reference);
                double weight = rule.Weights[q] * space.Maps.JacobianAt(cell, reference).Determinant
                    * Measure.At(place, setup.Coordinates);
                Tensor2D<double> tensor = permittivity.At(place);
                Vector2D flux = Flux(tensor, potential.GradientIn(cell, reference));
                element.Values(reference, shapes);
                Vector2D smooth = default;
                for (int i = 0; i < count; i++)
                {
                    smooth += shapes[i] * averages[unknowns[i]];
                }

                error += weight * EnergyDensity(tensor, smooth - flux);
                energy += weight * EnergyDensity(tensor, flux);
            }
        }
    }

    private static Vector2D[] Averages(NodeField<double> potential, string region, Permittivity permittivity)
    {
        NodeSpace space = potential.Space;
        Vector2D[] sums = new Vector2D[space.UnknownCount];
        int[] counts = new int[space.UnknownCount];
        Span<int> unknowns = stackalloc int[MostNodes];
        foreach (int cell in space.Mesh.CellsIn(region))
        {
            ReadOnlySpan<Point2D> nodes = space.ElementOn(space.Mesh.KindOf(cell)).NodePoints;
            space.Numbering.CellUnknowns(cell, unknowns);
            for (int i = 0; i < nodes.Length; i++)
            {
                Tensor2D<double> tensor = permittivity.At(space.Maps.PlaceOf(cell, nodes[i]));
                sums[unknowns[i]] += Flux(tensor, potential.GradientIn(cell, nodes[i]));
                counts[unknowns[i]]++;
            }
        }

        for (int i = 0; i < sums.Length; i++)
        {
            if (counts[i] > 1)
            {
                sums[i] /= counts[i];
            }
        }

        return sums;
    }

    private static Vector2D Flux(Tensor2D<double> tensor, FieldVector<double> gradient) => new(
        (tensor.XX * gradient.X) + (tensor.XY * gradient.Y),
        (tensor.YX * gradient.X) + (tensor.YY * gradient.Y));

    /// <summary>The flux density times the field that goes with it.</summary>
    private static double EnergyDensity(Tensor2D<double> tensor, Vector2D flux)
    {
        double determinant = (tensor.XX * tensor.YY) - (tensor.XY * tensor.YX);
        Vector2D field = new(
            ((tensor.YY * flux.X) - (tensor.XY * flux.Y)) / determinant,
            ((tensor.XX * flux.Y) - (tensor.YX * flux.X)) / determinant);
        return flux.Dot(field);
    }
}
