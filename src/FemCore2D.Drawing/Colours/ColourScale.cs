using System.Collections.Immutable;

namespace FemCore2D.Drawing;

/// <summary>
/// A path through the colours along which numbers are shown. The scales of the library are even in lightness, so
/// that equal steps of a number look equal, in print without colour and to the colour-blind too.
/// </summary>
/// <remarks>
/// The paths are drawn in the perceptual space of Ottosson (2020): lightness is an exact straight line, hue and chroma
/// change slowly beside it. Where two sides stand against each other, violets and blues face ochres and browns: these
/// stay apart under each kind of colour blindness as modelled by Machado, Oliveira and Fernandes (2009).
/// </remarks>
public sealed class ColourScale
{
    private const int TableSize = 1024;
    private readonly ImmutableArray<Colour> table;

    internal ColourScale(string name, ColourScaleKind kind, Func<double, Oklab> path)
    {
        Name = name;
        Kind = kind;
        table = [.. Enumerable.Range(0, TableSize).Select(i => path(i / (TableSize - 1.0)).ToColour())];
    }

    private ColourScale(string name, ColourScaleKind kind, ImmutableArray<Colour> table)
    {
        Name = name;
        Kind = kind;
        this.table = table;
    }

    /// <summary>From pale foam by slate blue and plum to the wine red of deep weed.</summary>
    public static ColourScale Undertow { get; } = new("Undertow", ColourScaleKind.Sequential, ScalePaths.Undertow);

    /// <summary>From the pale rose of a shell by ochre and marsh green to petrol.</summary>
    public static ColourScale Samphire { get; } = new("Samphire", ColourScaleKind.Sequential, ScalePaths.Samphire);

    /// <summary>Two sides of a middle: heather violet below, peat brown above, pale sand between.</summary>
    public static ColourScale EbbFlood { get; } = new("EbbFlood", ColourScaleKind.Diverging, ScalePaths.EbbFlood);

    /// <summary>Once around: from foam by blue to slate, and by ochre back to foam.</summary>
    public static ColourScale TideClock { get; } = new("TideClock", ColourScaleKind.Cyclic, ScalePaths.TideClock);

    /// <summary>The name of the scale.</summary>
    public string Name { get; }

    /// <summary>What the order of the colours stands for.</summary>
    public ColourScaleKind Kind { get; }

    /// <summary>Makes a scale that leads through given colours at even distances, mixed in the perceptual space.</summary>
    /// <param name="name">A name for the scale.</param>
    /// <param name="kind">What its order stands for.</param>
    /// <param name="colours">At least two colours.</param>
    /// <exception cref="ArgumentException">Fewer than two colours are given.</exception>
    public static ColourScale Through(string name, ColourScaleKind kind, params ReadOnlySpan<Colour> colours)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(name);
        if (colours.Length < 2)
            throw new ArgumentException("A colour scale leads through at least two colours.", nameof(colours));
        var stops = new Oklab[colours.Length];
        for (int i = 0; i < stops.Length; i++)
            stops[i] = Oklab.FromColour(colours[i]);
        return new ColourScale(name, kind, t =>
        {
            double place = t * (stops.Length - 1);
            int first = Math.Min((int)place, stops.Length - 2);
            return Oklab.Mix(stops[first], stops[first + 1], place - first);
        });
    }

    /// <summary>The colour at a fraction of the way.</summary>
    /// <param name="fraction">
    /// 0 at the start to 1 at the end; beyond them the end colours stay, and a cyclic scale begins anew.
    /// A fraction that is not a number gets a neutral grey.
    /// </param>
    public Colour At(double fraction)
    {
        if (double.IsNaN(fraction))
            return new Colour(128, 128, 128);
        if (Kind == ColourScaleKind.Cyclic && double.IsFinite(fraction))
            fraction -= Math.Floor(fraction);
        return table[(int)Math.Round(Math.Clamp(fraction, 0, 1) * (TableSize - 1))];
    }

    /// <summary>The same scale from its end to its start.</summary>
    public ColourScale Reversed() => new($"{Name}, reversed", Kind, [.. table.Reverse()]);

    /// <inheritdoc/>
    public override string ToString() => Name;
}
