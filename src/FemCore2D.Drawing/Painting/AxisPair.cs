using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The axes at the left and at the bottom of a panel, in the unit that suits its size.</summary>
internal sealed class AxisPair
{
    /// <summary>The room that the numbers and the title take below the plot.</summary>
    public const float Below = Ink.TickLength + 3 + Ink.TickSize + 5 + Ink.LabelSize + 3;

    private readonly Panel panel;
    private readonly UnitPrefix unit;
    private readonly List<(double Place, string Text)> horizontal;
    private readonly List<(double Place, string Text)> vertical;

    /// <summary>Chooses the unit and the numbers for about a width of the plot.</summary>
    public AxisPair(Panel panel, Box2D view, double widthPoints)
        : this(panel, view, widthPoints, widthPoints * view.Height / view.Width)
    {
    }

    private AxisPair(Panel panel, Box2D view, double widthPoints, double heightPoints)
    {
        this.panel = panel;
        double reach = new[] { view.Lower.X, view.Upper.X, view.Lower.Y, view.Upper.Y }.Max(Math.Abs);
        unit = UnitPrefix.For("m", reach);
        horizontal = Ticks(view.Lower.X, view.Upper.X, Math.Clamp(widthPoints / 48, 1.5, 9));
        vertical = Ticks(view.Lower.Y, view.Upper.Y, Math.Clamp(heightPoints / 30, 1.5, 9));
    }

    /// <summary>The room that the numbers and the title take beside the plot.</summary>
    public float Beside => Ink.TickLength + 4 + WidestNumber + 5 + Ink.LabelSize + 2;

    private float WidestNumber => vertical.Select(tick => Surface.WidthOf(tick.Text, Ink.TickSize)).Append(8).Max();

    /// <summary>The same axes for the final size of the plot.</summary>
    public AxisPair For(PlotFrame frame) => new(panel, frame.View, frame.Area.Width, frame.Area.Height);

    public void Draw(Surface surface, SKRect area)
    {
        float bottom = surface.Crisp(area.Bottom, Ink.HairWidth);
        float left = surface.Crisp(area.Left, Ink.HairWidth);
        surface.Line(left, bottom, area.Right, bottom, Ink.Axis, Ink.HairWidth);
        surface.Line(left, area.Top, left, bottom, Ink.Axis, Ink.HairWidth);
        var numbers = new TextStyle(Ink.TickSize, Ink.Text);
        foreach ((double place, string text) in horizontal)
        {
            float x = surface.Crisp(area.Left + (place * area.Width), Ink.HairWidth);
            surface.Line(x, bottom, x, bottom + Ink.TickLength, Ink.Axis, Ink.HairWidth);
            surface.Write(text, x, bottom + Ink.TickLength + 3 + (Ink.TickSize / 2), Anchor.Middle, numbers);
        }

        foreach ((double place, string text) in vertical)
        {
            float y = surface.Crisp(area.Bottom - (place * area.Height), Ink.HairWidth);
            surface.Line(left - Ink.TickLength, y, left, y, Ink.Axis, Ink.HairWidth);
            surface.Write(text, left - Ink.TickLength - 3, y, Anchor.End, numbers);
        }

        var titles = new TextStyle(Ink.LabelSize, Ink.Text);
        float below = bottom + Ink.TickLength + 3 + Ink.TickSize + 5 + (Ink.LabelSize / 2);
        surface.Write(unit.Title(panel.HorizontalName), area.MidX, below, Anchor.Middle, titles);
        float beside = left - Ink.TickLength - 3 - WidestNumber - 5 - (Ink.LabelSize / 2);
        surface.Write(unit.Title(panel.VerticalName), beside, area.MidY, Anchor.Middle, titles, degrees: -90);
    }

    private List<(double Place, string Text)> Ticks(double low, double high, double count)
    {
        double from = low / unit.Factor;
        double to = high / unit.Factor;
        List<double> values = RoundSteps.Multiples(from, to, RoundSteps.StepFor(to - from, count));
        int decimals = NumberText.DecimalsFor(values);
        return [.. values.Select(value => ((value - from) / (to - from), NumberText.Fixed(value, decimals)))];
    }
}
