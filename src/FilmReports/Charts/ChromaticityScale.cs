using Colorimetry;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>One of the two diagrams laid out on a plot: where chromaticities lie on paper, and back.</summary>
internal sealed record ChromaticityScale(Plot Plot, ChromaticityDiagram Diagram)
{
    /// <summary>Names of the axes.</summary>
    public (string Across, string Up) AxisNames => Diagram == ChromaticityDiagram.Xy1931 ? ("x", "y") : ("u′", "v′");

    /// <summary>The coordinates of a chromaticity in a diagram.</summary>
    public static (double Across, double Up) Coordinates(ChromaticityDiagram diagram, Chromaticity c) =>
        diagram == ChromaticityDiagram.Xy1931 ? (c.X, c.Y) : (c.UPrime, c.VPrime);

    /// <summary>Where a chromaticity lies.</summary>
    public Spot At(Chromaticity c)
    {
        var (across, up) = Coordinates(Diagram, c);
        return Plot.At(across, up);
    }

    /// <summary>Where several lie.</summary>
    public Spot[] At(params ReadOnlySpan<Chromaticity> chromaticities)
    {
        var spots = new Spot[chromaticities.Length];
        for (int i = 0; i < spots.Length; i++)
            spots[i] = At(chromaticities[i]);
        return spots;
    }

    /// <summary>The chromaticity at a place.</summary>
    public Chromaticity ChromaticityAt(Spot spot)
    {
        var (across, up) = Plot.ValueAt(spot);
        return Diagram == ChromaticityDiagram.Xy1931 ? new(across, up) : Chromaticity.FromUvPrime(across, up);
    }
}
