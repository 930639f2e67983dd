using System.Numerics;
using Colorimetry;

namespace FilmOptics.BeerLambert;

/// <summary>All layers of a film mixed into one: what a crossing absorbs, for source light and for emitted light.</summary>
/// <remarks>
/// A layer counts with its own thickness and path, so that equal layers add up to one and a clear barrier changes nothing.
/// </remarks>
internal readonly ref struct MixedLayer
{
    /// <summary>Mixes the layers.</summary>
    /// <param name="film">The film.</param>
    /// <param name="pathFactors">Path per thickness in each layer.</param>
    /// <param name="lotWeights">Out, one per lot: what its measured absorbance is multiplied with to give its part of the depth.</param>
    /// <param name="room">Room for twice 471 numbers.</param>
    public MixedLayer(Film film, ReadOnlySpan<double> pathFactors, Span<double> lotWeights, Span<double> room)
    {
        var hostDepth = room[..WavelengthGrid.Count];
        var depth = room.Slice(WavelengthGrid.Count, WavelengthGrid.Count);
        lotWeights.Clear();
        hostDepth.Clear();
        for (int l = 0; l < film.Layers.Count; l++)
        {
            var layer = film.Layers[l];
            double pathMm = layer.ThicknessMm * pathFactors[l];
            AddScaled(layer.HostAbsorption.Samples, pathMm, hostDepth);
            for (int d = 0; d < layer.Dots.Count; d++)
            {
                var dots = layer.Dots[d];
                lotWeights[film.IndexOf(dots.Lot)] += dots.AbsorptionPerMmPerAbsorbance * pathMm;
            }
        }

        hostDepth.CopyTo(depth);
        for (int i = 0; i < film.Lots.Count; i++)
            AddScaled(film.Lots[i].Absorbance.Samples, lotWeights[i], depth);
        HostDepth = hostDepth;
        Depth = depth;
    }

    /// <summary>Optical depth of one crossing, base e, at each wavelength.</summary>
    public ReadOnlySpan<double> Depth { get; }

    /// <summary>Its part in the host.</summary>
    public ReadOnlySpan<double> HostDepth { get; }

    private static void AddScaled(ReadOnlySpan<double> from, double factor, Span<double> to)
    {
        if (factor == 0)
            return;
        int i = 0;
        for (; i <= to.Length - Vector<double>.Count; i += Vector<double>.Count)
            (new Vector<double>(to[i..]) + (new Vector<double>(from[i..]) * factor)).CopyTo(to[i..]);
        for (; i < to.Length; i++)
            to[i] += from[i] * factor;
    }
}
