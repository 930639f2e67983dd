using System.Globalization;
using System.Numerics;
using Colorimetry;

namespace FilmOptics;

/// <summary>Spheres stirred into a layer to scatter: what they are and how much of the layer they fill.</summary>
/// <remarks>
/// Each particle scatters as if it were alone (<see cref="MieSphere"/>), which crowding breaks: see <see cref="In"/>.
/// Only the mean cosine of the exact angular pattern is kept, as the g of a Henyey–Greenstein function.
/// </remarks>
public sealed record ParticleLoading
{
    /// <summary>Share of the volume from which single-particle scattering is doubtful.</summary>
    /// <remarks>From memory: crowding lowers the scattering of white pigments above about 5 to 10 vol%.</remarks>
    public const double CrowdedVolumeShare = 0.05;

    // Radii per geometric standard deviation, and how many deviations out: the trapezoid sum is then exact to rounding for smooth curves.
    private const int StepsPerDeviation = 6, Deviations = 5;

    /// <summary>Radius, µm, above 0. With a size spread, half of the particles' volume is in larger ones (D50 ÷ 2).</summary>
    public required double RadiusUm { get; init; }

    /// <summary>Refractive index of the particle, above 0.</summary>
    public required Spectrum<RefractiveIndex> Index { get; init; }

    /// <summary>Absorbing part of that index, at least 0; null for clear particles.</summary>
    public Spectrum<RefractiveIndex>? AbsorbingIndex { get; init; }

    /// <summary>Share of the cured layer's volume, 0…1.</summary>
    public required double VolumeShare { get; init; }

    /// <summary>Geometric standard deviation of a log-normal spread of radii, 1 to 3; 1 is one size.</summary>
    public double SizeSpreadFactor { get; init; } = 1;

    /// <summary>Share of the volume for a share of the mass, as particles are weighed.</summary>
    /// <param name="weightPercent">Particles in the cured layer, wt%, 0…100.</param>
    /// <param name="particleGPerMl">Density of the particles, g/mL, above 0.</param>
    /// <param name="hostGPerMl">Density of the cured host, g/mL, above 0.</param>
    public static double VolumeShareFromWeight(double weightPercent, double particleGPerMl, double hostGPerMl)
    {
        RequireWithin(weightPercent, 0, 100, nameof(weightPercent));
        RequireWithin(particleGPerMl, double.Epsilon, double.MaxValue, nameof(particleGPerMl));
        RequireWithin(hostGPerMl, double.Epsilon, double.MaxValue, nameof(hostGPerMl));
        double particles = weightPercent / 100 / particleGPerMl, host = (1 - (weightPercent / 100)) / hostGPerMl;
        return particles / (particles + host);
    }

    /// <summary>What these particles do to light in a host.</summary>
    /// <param name="hostIndexFactor">Refractive index of the layer around them, 1 to 3.</param>
    /// <exception cref="ArgumentOutOfRangeException">A figure is out of its range.</exception>
    public ParticleScattering In(double hostIndexFactor)
    {
        RequireWithin(hostIndexFactor, 1, 3, nameof(hostIndexFactor));
        RequireWithin(RadiusUm, double.Epsilon, double.MaxValue, nameof(RadiusUm));
        RequireWithin(VolumeShare, 0, 1, nameof(VolumeShare));
        RequireWithin(SizeSpreadFactor, 1, 3, nameof(SizeSpreadFactor));
        var scattering = new double[WavelengthGrid.Count];
        var absorption = new double[WavelengthGrid.Count];
        var anisotropy = new double[WavelengthGrid.Count];
        var radii = Radii();
        for (int bin = 0; bin < WavelengthGrid.Count; bin++)
        {
            double absorbing = AbsorbingIndex?.Samples[bin] ?? 0, forward = 0;
            var relative = new Complex(Index.Samples[bin], absorbing) / hostIndexFactor;
            foreach ((double radiusUm, double share) in radii)
            {
                var sphere = MieSphere.Of(SizeFactor(radiusUm, hostIndexFactor, bin), relative);

                // Cross-section per volume of a sphere: Q π r² ÷ (4/3 π r³), per mm.
                double perMm = share * VolumeShare * 0.75 / radiusUm * 1000;
                double scattered = perMm * sphere.ScatteringEfficiencyFactor;
                scattering[bin] += scattered;
                forward += scattered * sphere.MeanCosine;
                absorption[bin] += absorbing > 0 ? perMm * sphere.AbsorptionEfficiencyFactor : 0;
            }

            anisotropy[bin] = scattering[bin] > 0 ? forward / scattering[bin] : 0;
        }

        string source = string.Create(CultureInfo.InvariantCulture, $"spheres of {RadiusUm} µm, Mie");
        return new(
            Spectrum.FromSamples<PerMm>(scattering, source),
            Spectrum.FromSamples<PerMm>(absorption, source),
            Spectrum.FromSamples<MeanCosine>(anisotropy, source),
            [.. Warnings()]);
    }

    private static double SizeFactor(double radiusUm, double hostIndexFactor, int bin) =>
        2 * Math.PI * radiusUm * 1000 * hostIndexFactor / WavelengthGrid.NmAt(bin);

    private static void RequireWithin(double value, double least, double most, string name)
    {
        if (!(value >= least && value <= most))
        {
            throw new ArgumentOutOfRangeException(name, value, string.Create(
                CultureInfo.InvariantCulture, $"{(least == double.Epsilon ? "Above 0" : $"At least {least}")} and at most {most} is allowed."));
        }
    }

    /// <summary>Radii with the share of the particles' volume that each stands for.</summary>
    private List<(double RadiusUm, double Share)> Radii()
    {
        if (SizeSpreadFactor == 1)
            return [(RadiusUm, 1)];
        const int reach = StepsPerDeviation * Deviations;
        double[] weights = [.. Enumerable.Range(-reach, (2 * reach) + 1)
            .Select(step => Math.Exp(-0.5 * Math.Pow(step / (double)StepsPerDeviation, 2)))];
        double sum = weights.Sum();
        return [.. weights.Select((weight, i) => (
            RadiusUm * Math.Pow(SizeSpreadFactor, (i - reach) / (double)StepsPerDeviation), weight / sum))];
    }

    private IEnumerable<string> Warnings()
    {
        if (VolumeShare > CrowdedVolumeShare)
        {
            yield return string.Create(
                CultureInfo.InvariantCulture,
                $"Particles fill {100 * VolumeShare:0.#} % of the layer's volume. Above about 5 to 10 % they crowd and scatter less than computed here particle by particle.");
        }
    }
}

/// <summary>Scattering and absorption by particles in a layer, to be added to the layer's own.</summary>
/// <param name="Scattering">Scattering coefficient, 1/mm.</param>
/// <param name="Absorption">Absorption by the particles, 1/mm; 0 for clear ones. Part of the host's losses.</param>
/// <param name="Anisotropy">Mean cosine g.</param>
/// <param name="Warnings">What makes the figures doubtful.</param>
public sealed record ParticleScattering(
    Spectrum<PerMm> Scattering, Spectrum<PerMm> Absorption, Spectrum<MeanCosine> Anisotropy, IReadOnlyList<string> Warnings);
