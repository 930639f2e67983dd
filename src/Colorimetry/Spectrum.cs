namespace Colorimetry;

/// <summary>One quantity, known at every wavelength of <see cref="WavelengthGrid"/>. Immutable.</summary>
/// <remarks>
/// <para>Shape: 471 samples, 360 to 830 nm inclusive, step 1 nm; sample i belongs to (360 + i) nm in air.</para>
/// <para>Units: carried by the type; adding photons to watts, or light to a filter, does not compile.</para>
/// <para>Errors: never resamples, pads, clips or extrapolates; a wrong count or a non-finite value is refused by name.</para>
/// <para>Source: says where the numbers came from, and a product names both of its sources.</para>
/// </remarks>
/// <typeparam name="TUnit">What a sample measures.</typeparam>
public sealed class Spectrum<TUnit>
    where TUnit : struct, ISpectralUnit
{
    private readonly double[] _samples;

    // Unchecked: for results of arithmetic on checked spectra. The public way in is Spectrum.FromSamples.
    internal Spectrum(double[] samples, string source) => (_samples, Source) = (samples, source);

    /// <summary>Where the numbers came from.</summary>
    public string Source { get; }

    /// <summary>All 471 samples, in <typeparamref name="TUnit"/>.</summary>
    public ReadOnlySpan<double> Samples => _samples;

    /// <summary>Sum over the grid times 1 nm.</summary>
    public double Integral => _samples.Sum();

    /// <summary>Largest sample.</summary>
    public double Peak => _samples.Max();

    /// <summary>Value at a whole wavelength, in <typeparamref name="TUnit"/>.</summary>
    /// <param name="wavelengthNm">360 to 830 nm.</param>
    public double this[int wavelengthNm] => _samples[WavelengthGrid.IndexOf(wavelengthNm)];

    /// <summary>Light (or a coefficient, or another filter) after a filter, in the unit of the left side.</summary>
    public static Spectrum<TUnit> operator *(Spectrum<TUnit> left, Spectrum<Fraction> filter)
    {
        ArgumentNullException.ThrowIfNull(left);
        ArgumentNullException.ThrowIfNull(filter);
        var product = new double[WavelengthGrid.Count];
        for (int i = 0; i < product.Length; i++)
            product[i] = left._samples[i] * filter.Samples[i];
        return new(product, $"{left.Source} x {filter.Source}");
    }

    /// <summary>Sum of two spectra of one unit.</summary>
    public static Spectrum<TUnit> operator +(Spectrum<TUnit> left, Spectrum<TUnit> right)
    {
        ArgumentNullException.ThrowIfNull(left);
        ArgumentNullException.ThrowIfNull(right);
        var sum = new double[WavelengthGrid.Count];
        for (int i = 0; i < sum.Length; i++)
            sum[i] = left._samples[i] + right._samples[i];
        return new(sum, $"{left.Source} + {right.Source}");
    }

    /// <summary>The spectrum times a pure number.</summary>
    /// <param name="factor">Any finite number.</param>
    public Spectrum<TUnit> ScaledBy(double factor) => new([.. _samples.Select(s => s * factor)], Source);

    /// <summary>The spectrum scaled so that its samples sum to 1.</summary>
    /// <exception cref="InvalidOperationException">The sum is not positive.</exception>
    public Spectrum<TUnit> NormalisedToUnitSum()
    {
        double sum = Integral;
        return sum > 0
            ? ScaledBy(1 / sum)
            : throw new InvalidOperationException($"{Source}: the samples sum to {sum}, which cannot be scaled to 1.");
    }
}

/// <summary>Ways to make a <see cref="Spectrum{TUnit}"/>.</summary>
public static class Spectrum
{
    /// <summary>The one checked way in.</summary>
    /// <param name="samples">471 finite values in <typeparamref name="TUnit"/>; copied.</param>
    /// <param name="source">Where they came from; names the spectrum in messages.</param>
    /// <exception cref="ArgumentException">The count is wrong or a value is not finite.</exception>
    public static Spectrum<TUnit> FromSamples<TUnit>(ReadOnlySpan<double> samples, string source)
        where TUnit : struct, ISpectralUnit
    {
        if (samples.Length != WavelengthGrid.Count)
        {
            throw new ArgumentException(
                $"{source}: {samples.Length} samples; the grid has {WavelengthGrid.Count}.", nameof(samples));
        }

        for (int i = 0; i < samples.Length; i++)
        {
            if (!double.IsFinite(samples[i]))
                throw new ArgumentException($"{source}: {samples[i]} at {WavelengthGrid.NmAt(i)} nm.", nameof(samples));
        }

        return new(samples.ToArray(), source);
    }

    /// <summary>The same value at every wavelength.</summary>
    /// <param name="value">A finite value in <typeparamref name="TUnit"/>.</param>
    /// <param name="source">Where it came from.</param>
    public static Spectrum<TUnit> Flat<TUnit>(double value, string source)
        where TUnit : struct, ISpectralUnit
    {
        var samples = new double[WavelengthGrid.Count];
        Array.Fill(samples, value);
        return FromSamples<TUnit>(samples, source);
    }

    /// <summary>A function sampled at every grid wavelength.</summary>
    /// <param name="valueAtNm">Value in <typeparamref name="TUnit"/> at a wavelength in nm.</param>
    /// <param name="source">Where it came from.</param>
    public static Spectrum<TUnit> Sampled<TUnit>(Func<double, double> valueAtNm, string source)
        where TUnit : struct, ISpectralUnit
    {
        ArgumentNullException.ThrowIfNull(valueAtNm);
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
            samples[i] = valueAtNm(WavelengthGrid.NmAt(i));
        return FromSamples<TUnit>(samples, source);
    }

    /// <summary>A Gaussian line of height 1: exp(−4 ln 2 ((λ − peak)/FWHM)²).</summary>
    /// <param name="peakNm">Peak wavelength, nm.</param>
    /// <param name="fwhmNm">Full width at half maximum, nm, above 0.</param>
    public static Spectrum<TUnit> Gaussian<TUnit>(double peakNm, double fwhmNm)
        where TUnit : struct, ILightUnit
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(fwhmNm);
        return Sampled<TUnit>(
            nm => Math.Exp(-4 * Math.Log(2) * (nm - peakNm) * (nm - peakNm) / (fwhmNm * fwhmNm)),
            string.Create(System.Globalization.CultureInfo.InvariantCulture, $"Gaussian {peakNm} nm, FWHM {fwhmNm} nm"));
    }
}
