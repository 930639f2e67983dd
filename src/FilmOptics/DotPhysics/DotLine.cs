namespace FilmOptics;

/// <summary>Widths and shifts of a dot's line.</summary>
public static class DotLine
{
    /// <summary>FWHM ÷ standard deviation of a Gaussian: 2 √(2 ln 2).</summary>
    public static readonly double FwhmPerDeviation = 2 * Math.Sqrt(2 * Math.Log(2));

    /// <summary>Width in energy of a width in wavelength, meV, to first order: ΔE = hc Δλ/λ².</summary>
    /// <param name="fwhmNm">FWHM, nm.</param>
    /// <param name="peakNm">Peak, nm.</param>
    public static double FwhmMev(double fwhmNm, double peakNm) => 1000 * EffectiveMass.PhotonEvNm * fwhmNm / (peakNm * peakNm);

    /// <summary>Width in wavelength of a width in energy, nm, to first order.</summary>
    /// <param name="fwhmMev">FWHM, meV.</param>
    /// <param name="peakNm">Peak, nm.</param>
    public static double FwhmNm(double fwhmMev, double peakNm) => fwhmMev * peakNm * peakNm / (1000 * EffectiveMass.PhotonEvNm);

    /// <summary>FWHM that a spread of sizes gives, meV: |dE/dD| × σ × 2.3548.</summary>
    /// <param name="slopeMevPerNm">dE/dD, meV/nm.</param>
    /// <param name="diameterNm">Mean diameter, nm.</param>
    /// <param name="spreadShare">Standard deviation of the diameter ÷ the diameter.</param>
    public static double SpreadFwhmMev(double slopeMevPerNm, double diameterNm, double spreadShare) =>
        Math.Abs(slopeMevPerNm) * diameterNm * spreadShare * FwhmPerDeviation;

    /// <summary>FWHM of a Gaussian line broadened by a Gaussian spread: roots of sums of squares.</summary>
    /// <param name="homogeneousMev">FWHM of one dot, meV.</param>
    /// <param name="inhomogeneousMev">FWHM by the spread, meV.</param>
    public static double TotalFwhmMev(double homogeneousMev, double inhomogeneousMev) =>
        Math.Sqrt((homogeneousMev * homogeneousMev) + (inhomogeneousMev * inhomogeneousMev));

    /// <summary>Gap at a temperature after Varshni, Physica 34, 149 (1967): E(T) = E₀ − α T²/(T + β), eV.</summary>
    /// <param name="zeroEv">E₀, eV.</param>
    /// <param name="alphaEvPerKelvin">α, eV/K.</param>
    /// <param name="betaKelvin">β, K.</param>
    /// <param name="temperatureKelvin">T, K.</param>
    public static double VarshniEv(double zeroEv, double alphaEvPerKelvin, double betaKelvin, double temperatureKelvin) =>
        zeroEv - (alphaEvPerKelvin * temperatureKelvin * temperatureKelvin / (temperatureKelvin + betaKelvin));

    /// <summary>Its slope, meV/K.</summary>
    /// <inheritdoc cref="VarshniEv"/>
    public static double VarshniSlopeMevPerKelvin(double alphaEvPerKelvin, double betaKelvin, double temperatureKelvin) =>
        -1000 * alphaEvPerKelvin * temperatureKelvin * (temperatureKelvin + (2 * betaKelvin)) / Math.Pow(temperatureKelvin + betaKelvin, 2);

    /// <summary>Shift of a line with the temperature, nm/K.</summary>
    /// <param name="slopeMevPerKelvin">dE/dT, meV/K.</param>
    /// <param name="peakNm">Peak, nm.</param>
    public static double ShiftNmPerKelvin(double slopeMevPerKelvin, double peakNm) => -FwhmNm(slopeMevPerKelvin, peakNm);
}
