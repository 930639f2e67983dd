using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Absorption of a film with its loadings, at the bins of its light. Filled anew for each film.</summary>
/// <param name="lights">Light and absorbers.</param>
/// <param name="layers">Layers of the film.</param>
internal sealed class FilmSpectra(FilmLights lights, int layers)
{
    public FilmLights Lights { get; } = lights;

    /// <summary>Absorption of each layer, 1/mm, host and dots.</summary>
    public double[][] Absorption { get; } = [.. Enumerable.Range(0, layers).Select(_ => new double[lights.Bins.Length])];

    /// <summary>Channels of a bin: all that arrives; then, of what its layer absorbs, the share of each emitter; then the share of each layer's host.</summary>
    public int Channels => 1 + Lights.Emitters.Length + layers;

    /// <summary>At [bin × stride + channel]; the stride is a multiple of four.</summary>
    public double[] Shares { get; } = new double[lights.Bins.Length * StrideOf(1 + lights.Emitters.Length + layers)];

    public int Stride { get; } = StrideOf(1 + lights.Emitters.Length + layers);

    public static int ChannelOf(int emitter) => 1 + emitter;

    public int ChannelOfHost(int layer) => 1 + Lights.Emitters.Length + layer;

    /// <summary>Takes in the loadings of a film.</summary>
    /// <exception cref="NumericalFailureException">A layer's absorption is no number from 0.</exception>
    public void Load(IReadOnlyList<MergedLayer> film)
    {
        int emitter = 0;
        Span<double> factors = stackalloc double[Lights.Emitters.Length];
        for (int layer = 0; layer < film.Count; layer++)
        {
            int first = emitter;
            var dots = film[layer].Layer.Dots;
            for (int entry = 0; entry < dots.Count; entry++)
                factors[emitter++] = dots[entry].AbsorptionPerMmPerAbsorbance;
            Split(film[layer], layer, first, factors[first..emitter]);
        }
    }

    private static int StrideOf(int channels) => (channels + 3) & ~3;

    private void Split(MergedLayer layer, int position, int first, ReadOnlySpan<double> factors)
    {
        double[] host = Lights.Host[position], absorption = Absorption[position];
        for (int bin = 0; bin < absorption.Length; bin++)
        {
            var shares = Shares.AsSpan(bin * Stride, Stride);
            double sum = host[bin];
            for (int i = 0; i < factors.Length; i++)
                sum += shares[1 + first + i] = factors[i] * Lights.UnitAbsorption[first + i][bin];
            if (!(sum >= 0) || !double.IsFinite(sum))
            {
                throw new NumericalFailureException(FormattableString.Invariant(
                    $"Layer '{layer.Layer.Name}': absorption {sum} per mm at {WavelengthGrid.NmAt(Lights.Bins[bin])} nm; it has to be at least 0."));
            }

            // Where nothing absorbs, a rounding error of the interpolation is the host's.
            double reciprocal = sum > 0 ? 1 / sum : 0;
            absorption[bin] = sum;
            shares[0] = 1;
            shares[ChannelOfHost(position)] = sum > 0 ? host[bin] * reciprocal : 1;
            for (int i = 0; i < factors.Length; i++)
                shares[1 + first + i] *= reciprocal;
        }
    }
}
