using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Light × shares, summed over the bins that draw on each state.</summary>
/// <remarks>What the film does with light is linear in it, so these sums are all that the answers of the states meet.</remarks>
internal sealed class LightMoments
{
    private readonly FilmSpectra _spectra;
    private readonly double[][] _moments;

    public LightMoments(FilmSpectra spectra, int states)
    {
        (_spectra, States) = (spectra, states);
        _moments = [.. spectra.Lights.Lines.Select(_ => new double[states * spectra.Stride])];
    }

    public int States { get; }

    /// <summary>Moment of a line's light in a channel at a state.</summary>
    public double At(int line, int state, int channel) => _moments[line][(state * _spectra.Stride) + channel];

    /// <summary>Sums anew.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Fill(StateWeights weights)
    {
        int stride = _spectra.Stride, width = weights.Width;
        ref double shares = ref _spectra.Shares[0];
        ref double bins = ref weights.Weights[0];
        for (int line = 0; line < _moments.Length; line++)
        {
            var light = _spectra.Lights.Lines[line];
            double[] photons = light.Photons;
            Array.Clear(_moments[line]);
            for (int bin = light.First; bin < light.End; bin++)
            {
                ref double weight = ref Unsafe.Add(ref bins, bin * width);
                ref double moment = ref _moments[line][weights.First[bin] * stride];
                for (int channel = 0; channel < stride; channel += Vector256<double>.Count)
                {
                    var share = Vector256.LoadUnsafe(ref Unsafe.Add(ref shares, (bin * stride) + channel)) * Vector256.Create(photons[bin]);
                    ref double target = ref Unsafe.Add(ref moment, channel);
                    for (int i = 0; i < width; i++)
                    {
                        var sum = Vector256.MultiplyAddEstimate(Vector256.Create(Unsafe.Add(ref weight, i)), share, Vector256.LoadUnsafe(ref target));
                        sum.StoreUnsafe(ref target);
                        target = ref Unsafe.Add(ref target, stride);
                    }
                }
            }
        }
    }
}
