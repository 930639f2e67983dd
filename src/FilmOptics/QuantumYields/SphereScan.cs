using Colorimetry;

namespace FilmOptics;

/// <summary>One scan of an integrating sphere, in photons per nm of one arbitrary scale.</summary>
/// <remarks>Rows stay as they were measured: a yield needs sums over windows, and a sum over the rows themselves keeps its noise in sight.</remarks>
public sealed class SphereScan
{
    private readonly double[] _wavelengthsNm;
    private readonly double[] _photonsPerNm;

    private SphereScan(string name, double[] wavelengthsNm, double[] photonsPerNm) =>
        (Name, _wavelengthsNm, _photonsPerNm) = (name, wavelengthsNm, photonsPerNm);

    /// <summary>The file.</summary>
    public string Name { get; }

    /// <summary>Wavelengths, nm, rising.</summary>
    public ReadOnlySpan<double> WavelengthsNm => _wavelengthsNm;

    /// <summary>Photons per nm at each.</summary>
    public ReadOnlySpan<double> PhotonsPerNm => _photonsPerNm;

    /// <summary>Reads a scan of photons or of power per nm; negative values are noise and stay.</summary>
    /// <param name="table">The file, with a column photons_per_nm or power_per_nm.</param>
    /// <param name="response">Response of sphere and detector by wavelength, a column response; the scan is divided by it. Null where that is done already.</param>
    /// <exception cref="InputException">There is no such column, fewer than 8 rows, or the response does not cover the scan or is not above 0.</exception>
    public static SphereScan From(SpectrumTable table, SpectrumTable? response)
    {
        ArgumentNullException.ThrowIfNull(table);
        string column = table.Columns.FirstOrDefault(name => name is "photons_per_nm" or "power_per_nm")
            ?? throw new InputException(table.Fault($"a sphere scan needs a column photons_per_nm or power_per_nm; the file has {string.Join(", ", table.Columns)}."));
        double[] wavelengths = table.WavelengthsNm.ToArray(), photons = table.Values(column).ToArray();
        if (photons.Length < 8)
            throw new InputException(table.Fault($"{photons.Length} rows; a sphere scan needs at least 8."));
        for (int i = 0; i < photons.Length; i++)
        {
            // A photon's energy falls with the wavelength; 500 nm keeps both kinds of scan near one scale.
            photons[i] *= column == "power_per_nm" ? wavelengths[i] / 500 : 1;
            if (response is not null)
                photons[i] /= ResponseAt(response, wavelengths[i]);
        }

        return new(table.Name, wavelengths, photons);
    }

    /// <summary>Photons between two wavelengths, by the trapezoidal rule, with the standard uncertainty that the noise of the rows gives it.</summary>
    /// <param name="window">The window; it has to lie within the scan.</param>
    /// <exception cref="InputException">The scan does not cover the window.</exception>
    public MeasuredSum Sum(WavelengthWindow window)
    {
        if (window.LowNm < _wavelengthsNm[0] || window.HighNm > _wavelengthsNm[^1])
        {
            throw new InputException(new InputFault(Name, null, null, FormattableString.Invariant(
                $"the scan covers {_wavelengthsNm[0]} to {_wavelengthsNm[^1]} nm; the window {window.LowNm} to {window.HighNm} nm has to lie within.")));
        }

        double sum = 0, variance = 0;
        for (int i = 0; i < _wavelengthsNm.Length; i++)
        {
            double weight = Weight(i, window);
            if (weight == 0)
                continue;
            sum += weight * _photonsPerNm[i];
            variance += weight * weight * Variance(i);
        }

        return new(sum, Math.Sqrt(variance));
    }

    /// <summary>The window of the exciting light: where this scan of it stands above a thousandth of its peak, and a quarter of that width on either side.</summary>
    public WavelengthWindow PumpWindow()
    {
        int peak = 0;
        for (int i = 0; i < _photonsPerNm.Length; i++)
            peak = _photonsPerNm[i] > _photonsPerNm[peak] ? i : peak;
        double least = _photonsPerNm[peak] / 1000;
        int low = peak, high = peak;
        while (low > 0 && _photonsPerNm[low - 1] > least)
            low--;
        while (high + 1 < _photonsPerNm.Length && _photonsPerNm[high + 1] > least)
            high++;
        double margin = (_wavelengthsNm[high] - _wavelengthsNm[low]) / 4;
        return new(Math.Max(_wavelengthsNm[0], _wavelengthsNm[low] - margin), Math.Min(_wavelengthsNm[^1], _wavelengthsNm[high] + margin));
    }

    /// <summary>Value at a wavelength, linear between rows.</summary>
    /// <param name="wavelengthNm">Within the scan, nm.</param>
    public double At(double wavelengthNm)
    {
        int after = Array.BinarySearch(_wavelengthsNm, wavelengthNm);
        if (after >= 0)
            return _photonsPerNm[after];
        after = Math.Clamp(~after, 1, _wavelengthsNm.Length - 1);
        double share = (wavelengthNm - _wavelengthsNm[after - 1]) / (_wavelengthsNm[after] - _wavelengthsNm[after - 1]);
        return _photonsPerNm[after - 1] + (share * (_photonsPerNm[after] - _photonsPerNm[after - 1]));
    }

    // The share of a row in the integral of the broken line through the rows, over the window.
    private double Weight(int row, WavelengthWindow window)
    {
        double weight = 0;
        if (row > 0)
            weight += Hat(_wavelengthsNm[row - 1], _wavelengthsNm[row], window);
        if (row + 1 < _wavelengthsNm.Length)
            weight += Hat(_wavelengthsNm[row + 1], _wavelengthsNm[row], window);
        return weight;
    }

    // ∫ of the line that is 0 at the neighbour and 1 at the row, over what the window leaves of that step.
    private static double Hat(double neighbourNm, double rowNm, WavelengthWindow window)
    {
        double low = Math.Max(Math.Min(neighbourNm, rowNm), window.LowNm), high = Math.Min(Math.Max(neighbourNm, rowNm), window.HighNm);
        return high <= low ? 0 : (high - low) * (((low + high) / 2) - neighbourNm) / (rowNm - neighbourNm);
    }

    // Third differences leave noise and nearly nothing of a smooth line: 1, −3, 3, −1 squared sum to 20. A mean over 7 of them steadies the estimate.
    private double Variance(int row)
    {
        int last = _photonsPerNm.Length - 4, first = Math.Clamp(row - 4, 0, Math.Max(0, last - 6)), end = Math.Min(first + 7, last + 1);
        double sum = 0;
        for (int i = first; i < end; i++)
        {
            double difference = _photonsPerNm[i + 3] - (3 * _photonsPerNm[i + 2]) + (3 * _photonsPerNm[i + 1]) - _photonsPerNm[i];
            sum += difference * difference / 20;
        }

        return sum / (end - first);
    }

    private static double ResponseAt(SpectrumTable response, double wavelengthNm)
    {
        var wavelengths = response.WavelengthsNm;
        var values = response.Values("response");
        int after = wavelengths.BinarySearch(wavelengthNm);
        if (after < 0)
            after = ~after;
        if (after == wavelengths.Length || (after == 0 && wavelengths[0] > wavelengthNm))
        {
            throw new InputException(response.Fault(FormattableString.Invariant(
                $"the response covers {wavelengths[0]} to {wavelengths[^1]} nm; the scan reaches {wavelengthNm} nm.")));
        }

        double value = wavelengths[after] == wavelengthNm
            ? values[after]
            : values[after - 1] + ((wavelengthNm - wavelengths[after - 1]) / (wavelengths[after] - wavelengths[after - 1]) * (values[after] - values[after - 1]));
        return value > 0
            ? value
            : throw new InputException(response.FaultAt(after, "response", FormattableString.Invariant($"{value} near {wavelengthNm} nm; a response has to be above 0.")));
    }
}

/// <summary>Wavelengths between which photons are counted.</summary>
/// <param name="LowNm">Lower end, nm.</param>
/// <param name="HighNm">Upper end, nm, above the lower.</param>
public readonly record struct WavelengthWindow(double LowNm, double HighNm);

/// <summary>A sum over measured rows.</summary>
/// <param name="Photons">Its value, in the scan's own scale.</param>
/// <param name="UncertaintyPhotons">Its standard uncertainty, from the noise of the rows.</param>
public readonly record struct MeasuredSum(double Photons, double UncertaintyPhotons);
