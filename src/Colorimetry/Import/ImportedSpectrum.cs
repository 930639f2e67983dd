namespace Colorimetry;

/// <summary>A column on the grid, and how it came there.</summary>
/// <typeparam name="TUnit">What a sample measures.</typeparam>
/// <param name="Spectrum">The spectrum; its source is the file's name.</param>
/// <param name="Interpolation">How values between rows were found.</param>
/// <param name="Warnings">What a user should know, each with the file's name: noise taken as zero. Empty if nothing.</param>
public sealed record ImportedSpectrum<TUnit>(
    Spectrum<TUnit> Spectrum, Interpolation Interpolation, IReadOnlyList<string> Warnings)
    where TUnit : struct, ISpectralUnit
{
    /// <summary>The interpolation and what stands outside the file's range, in a sentence for people.</summary>
    public string Explanation { get; init; } = "";
}
