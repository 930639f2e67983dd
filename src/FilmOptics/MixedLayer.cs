using Colorimetry;

namespace FilmOptics;

/// <summary>All layers of a film as one: optical depth along the normal, base e, of each lot and of the host.</summary>
internal static class MixedLayer
{
    /// <summary>Depths at each grid wavelength: of each lot of the film (in its order), and of the host.</summary>
    public static (double[][] ByLot, double[] Host) Of(Film film)
    {
        var byLot = new double[film.Lots.Count][];
        for (int i = 0; i < byLot.Length; i++)
            byLot[i] = new double[WavelengthGrid.Count];
        var host = new double[WavelengthGrid.Count];
        foreach (var layer in film.Layers)
        {
            var absorption = layer.HostAbsorption.Samples;
            for (int w = 0; w < host.Length; w++)
                host[w] += absorption[w] * layer.ThicknessMm;
            foreach (var dots in layer.Dots)
            {
                double scale = dots.AbsorptionPerMmPerAbsorbance * layer.ThicknessMm;
                var absorbance = dots.Lot.Absorbance.Samples;
                double[] depth = byLot[film.IndexOf(dots.Lot)];
                for (int w = 0; w < depth.Length; w++)
                    depth[w] += absorbance[w] * scale;
            }
        }

        return (byLot, host);
    }
}
