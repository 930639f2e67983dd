namespace FilmOptics.DiscreteOrdinates;

/// <summary>Sets of optical properties to solve the film for; each column is one state.</summary>
internal sealed class OpticalStates(int layers, int count)
{
    public int Count => count;

    /// <summary>Absorption of each layer with its dots, 1/mm, at [layer][state].</summary>
    public double[][] Absorption { get; } = Columns(layers, count);

    /// <summary>Scattering of each layer, 1/mm, at [layer][state].</summary>
    public double[][] Scattering { get; } = Columns(layers, count);

    /// <summary>Anisotropy of each layer, at [layer][state].</summary>
    public double[][] Anisotropy { get; } = Columns(layers, count);

    public double[] BelowReflectance { get; } = new double[count];

    public double[] AboveReflectance { get; } = new double[count];

    public double[] AboveAbsorptance { get; } = new double[count];

    /// <summary>A film's properties at wavelengths of the grid.</summary>
    /// <param name="film">The film.</param>
    /// <param name="layers">Its layers.</param>
    /// <param name="bins">Positions on the grid.</param>
    public static OpticalStates At(Film film, IReadOnlyList<MergedLayer> layers, ReadOnlySpan<int> bins)
    {
        var states = new OpticalStates(layers.Count, bins.Length);
        for (int state = 0; state < bins.Length; state++)
        {
            int bin = bins[state];
            states.BelowReflectance[state] = film.Cavity.BelowReflectance.Samples[bin];
            states.AboveReflectance[state] = film.Cavity.AboveReflectance.Samples[bin];
            states.AboveAbsorptance[state] = film.Cavity.AboveAbsorptance.Samples[bin];
            for (int i = 0; i < layers.Count; i++)
            {
                var layer = layers[i].Layer;
                double absorption = layer.HostAbsorption.Samples[bin];
                foreach (var dots in layer.Dots)
                    absorption += dots.AbsorptionPerMm(bin);
                states.Absorption[i][state] = absorption;
                states.Scattering[i][state] = layer.Scattering.Samples[bin];
                states.Anisotropy[i][state] = layer.Anisotropy.Samples[bin];
            }
        }

        return states;
    }

    /// <summary>Longest flight after which guided light is at the edges, mm; infinite where everything ends sooner.</summary>
    public double LongestFlightMm(Film film, IReadOnlyList<MergedLayer> layers)
    {
        double longest = SheetMm(film, layers);
        for (int layer = 0; layer < layers.Count; layer++)
        {
            for (int state = 0; state < Count; state++)
            {
                if ((Absorption[layer][state] + Scattering[layer][state]) * longest < GuidedLight<WideLanes>.OutOfReach)
                    return longest;
            }
        }

        return double.PositiveInfinity;
    }

    /// <summary>Width of the sheet, mm; endless ones end far away.</summary>
    public static double SheetMm(Film film, IReadOnlyList<MergedLayer> layers) => film.Sheet?.WidthMm ?? 1e6 * layers.Sum(layer => layer.ThicknessMm);

    private static double[][] Columns(int layers, int count) => [.. Enumerable.Range(0, layers).Select(_ => new double[count])];
}
