using System.Globalization;
using Colorimetry;

namespace FilmOptics;

/// <summary>A reading of a haze meter on a coat without dots (or beyond their absorption), and what is known of the coat.</summary>
public sealed record HazeMeasurement
{
    /// <summary>All light that passed, 0…1, the faces' reflection included, as meters give it.</summary>
    public required double TotalTransmittanceShare { get; init; }

    /// <summary>Share of that deflected by more than 2.5 degrees, 0…1.</summary>
    public required double HazeShare { get; init; }

    /// <summary>Thickness, mm, above 0.</summary>
    public required double ThicknessMm { get; init; }

    /// <summary>Refractive index of the coat, 1 to 3.</summary>
    public required double RefractiveIndex { get; init; }

    /// <summary>Absorption of the host, 1/mm, base e.</summary>
    public double AbsorptionPerMm { get; init; }

    /// <summary>Standard uncertainty of both readings, as a share; common practice, no source: half a percentage point.</summary>
    public double UncertaintyShare { get; init; } = 0.005;

    /// <summary>What a clear coat of this index and absorption passes: no scattering passes more.</summary>
    public double ClearTransmittanceShare
    {
        get
        {
            double face = Math.Pow((RefractiveIndex - 1) / (RefractiveIndex + 1), 2), pass = Math.Exp(-AbsorptionPerMm * ThicknessMm);
            return (1 - face) * (1 - face) * pass / (1 - (face * face * pass * pass));
        }
    }

    internal void Check(string source)
    {
        var faults = new List<InputFault>();
        Require(TotalTransmittanceShare is > 0 and <= 1, $"a total transmittance of {TotalTransmittanceShare:g6}; above 0 and at most 1 is allowed.");
        Require(HazeShare is > 0 and < 1, $"a haze of {HazeShare:g6}; between 0 and 1 is allowed. Without haze there is no scattering to find.");
        Require(ThicknessMm is > 0 and <= 10, $"a thickness of {ThicknessMm:g6} mm; above 0 and at most 10 mm is allowed.");
        Require(RefractiveIndex is >= 1 and <= 3, $"a refractive index of {RefractiveIndex:g6}; 1 to 3 is allowed.");
        Require(AbsorptionPerMm is >= 0 and < double.PositiveInfinity, $"an absorption of {AbsorptionPerMm:g6} per mm; at least 0 is allowed.");
        Require(UncertaintyShare is > 0 and < 1, $"an uncertainty of {UncertaintyShare:g6}; between 0 and 1 is allowed.");
        if (faults.Count == 0)
        {
            Require(
                TotalTransmittanceShare <= ClearTransmittanceShare,
                $"a total transmittance of {100 * TotalTransmittanceShare:0.##} %; a clear coat of index {RefractiveIndex:g4} and this absorption passes {100 * ClearTransmittanceShare:0.##} % at most. Check the index, the absorption and the meter's zero.");
        }

        if (faults.Count > 0)
            throw new InputException(faults);

        void Require(bool met, FormattableString message)
        {
            if (!met)
                faults.Add(new(source, null, null, message.ToString(CultureInfo.InvariantCulture)));
        }
    }
}
