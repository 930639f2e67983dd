namespace Colorimetry;

/// <summary>The one wavelength grid of the project: 360 to 830 nm inclusive, step 1 nm, in air.</summary>
/// <remarks>Source: the range is that of the CIE colour-matching functions (CIE 15, CIE 018).</remarks>
public static class WavelengthGrid
{
    /// <summary>First wavelength, nm.</summary>
    public const int FirstNm = 360;

    /// <summary>Last wavelength, nm.</summary>
    public const int LastNm = 830;

    /// <summary>Number of samples.</summary>
    public const int Count = LastNm - FirstNm + 1;

    /// <summary>Sample index of a whole wavelength.</summary>
    /// <param name="wavelengthNm">360 to 830 nm.</param>
    /// <exception cref="ArgumentOutOfRangeException">The wavelength is off the grid.</exception>
    public static int IndexOf(int wavelengthNm) => wavelengthNm is >= FirstNm and <= LastNm
        ? wavelengthNm - FirstNm
        : throw new ArgumentOutOfRangeException(
            nameof(wavelengthNm), wavelengthNm, $"{wavelengthNm} nm is off the grid, {FirstNm} to {LastNm} nm.");

    /// <summary>Wavelength of a sample, nm.</summary>
    /// <param name="index">0 to 470.</param>
    public static int NmAt(int index) => FirstNm + index;
}
