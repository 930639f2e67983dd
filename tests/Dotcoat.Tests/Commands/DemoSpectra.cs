using System.Globalization;
using System.Text;

namespace Dotcoat.Tests.Commands;

/// <summary>Makes the invented spectra of spectra/demo. Nothing here was measured; the shapes are those the trade knows.</summary>
/// <remarks>
/// Emission: a Gaussian in wavelength with a wider red flank and a faint red tail. Absorbance: three excitons on
/// a band that rises towards the blue, and for the red cadmium-based lots a shell that absorbs in the blue. Scaled to the
/// absorbance per cm at 1 mg/mL and 450 nm that a core share of 10 to 25 % of the mass gives (common practice, no source).
/// </remarks>
internal static class DemoSpectra
{
    private const double EvNm = 1239.842; // h c / e, in eV nm

    private static readonly DemoLot[] Lots =
    [
        new("green-k07", "green cadmium-based lot K07", PeakNm: 528, FwhmNm: 24, ExcitonNm: 512, WidthEv: 0.042, At450: 2.32, ShellEv: 2.75, Shell: 0.5),
        new("green-k11", "green cadmium-based lot K11", PeakNm: 534, FwhmNm: 27, ExcitonNm: 517, WidthEv: 0.047, At450: 2.18, ShellEv: 2.75, Shell: 0.4),
        new("red-k23", "red cadmium-based lot K23", PeakNm: 629, FwhmNm: 25, ExcitonNm: 614, WidthEv: 0.033, At450: 3.26, ShellEv: 2.52, Shell: 2.2),
        new("red-k31", "red cadmium-based lot K31", PeakNm: 637, FwhmNm: 29, ExcitonNm: 621, WidthEv: 0.038, At450: 3.55, ShellEv: 2.50, Shell: 2.6),
        new("green-p04", "green indium-based lot P04", PeakNm: 531, FwhmNm: 38, ExcitonNm: 501, WidthEv: 0.075, At450: 0.72, ShellEv: 2.95, Shell: 0.2),
        new("green-p09", "green indium-based lot P09", PeakNm: 537, FwhmNm: 41, ExcitonNm: 506, WidthEv: 0.082, At450: 0.68, ShellEv: 2.95, Shell: 0.2),
        new("red-p15", "red indium-based lot P15", PeakNm: 626, FwhmNm: 40, ExcitonNm: 597, WidthEv: 0.060, At450: 1.21, ShellEv: 2.90, Shell: 0.3),
        new("red-p18", "red indium-based lot P18", PeakNm: 634, FwhmNm: 44, ExcitonNm: 605, WidthEv: 0.066, At450: 1.28, ShellEv: 2.90, Shell: 0.3),
    ];

    /// <summary>Every spectrum file of the demo: name and text.</summary>
    public static IEnumerable<(string Name, string Text)> Files()
    {
        yield return Led("led-blue-447.csv", peakNm: 447, fwhmNm: 19);
        yield return Led("led-blue-455.csv", peakNm: 455, fwhmNm: 20);
        foreach (var lot in Lots)
        {
            yield return Emission(lot);
            yield return Absorbance(lot);
        }

        yield return Filters("filters-wide.csv", "wide-gamut set: narrow green, little overlap", blueEndNm: 497, greenStartNm: 499, greenEndNm: 580, redStartNm: 598, edgeNm: 5.5, floor: 0.002);
        yield return Filters("filters-bright.csv", "bright set: broad green, more overlap", blueEndNm: 508, greenStartNm: 486, greenEndNm: 595, redStartNm: 587, edgeNm: 8, floor: 0.004);
    }

    private static (string Name, string Text) Led(string name, double peakNm, double fwhmNm) => File(
        name, $"blue LED, peak {peakNm} nm, as it reaches the film", "relative, 1 at the peak", "power_per_nm", 380, 540, 1,
        nm => [Line(nm, peakNm, fwhmNm, redFlank: 1.18, tail: 0.004)]);

    private static (string Name, string Text) Emission(DemoLot lot) => File(
        $"{lot.Stem}-emission.csv", $"photoluminescence of {lot.Title}, dilute, photons", "relative, 1 at the peak", "photons_per_nm",
        lot.PeakNm - 100, lot.PeakNm + 170, 1, nm => [Line(nm, lot.PeakNm, lot.FwhmNm, redFlank: 1.14, tail: 0.012)]);

    private static (string Name, string Text) Absorbance(DemoLot lot)
    {
        double scale = lot.At450 / Band(lot, 450);
        return File(
            $"{lot.Stem}-absorbance.csv", $"decadic absorbance of {lot.Title}, dilute", "1/cm at 1 mg/mL of dots with ligand", "absorbance_per_cm",
            360, 830, 2, nm => [scale * Band(lot, nm)]);
    }

    private static (string Name, string Text) Filters(
        string name, string title, double blueEndNm, double greenStartNm, double greenEndNm, double redStartNm, double edgeNm, double floor) => File(
        name, $"colour filters with their polarisers left out, {title}", "transmittance, 0 to 1", "red,green,blue", 360, 830, 5,
        nm =>
        [
            floor + (0.90 * Rise(nm, redStartNm, edgeNm)) + (0.02 * Bump(nm, 425, 30)),
            floor + (0.84 * Rise(nm, greenStartNm, edgeNm) * Rise(-nm, -greenEndNm, edgeNm * 1.3)) + (0.05 * Rise(nm, 770, 20)),
            floor + (0.78 * Rise(nm, 400, 12) * Rise(-nm, -blueEndNm, edgeNm * 1.2)) + (0.04 * Rise(nm, 780, 20)),
        ]);

    // A line of height 1 whose two flanks keep the stated FWHM, and a faint tail towards the red.
    private static double Line(double nm, double peakNm, double fwhmNm, double redFlank, double tail)
    {
        double blueHalf = fwhmNm / (1 + redFlank), redHalf = fwhmNm - blueHalf;
        double half = nm < peakNm ? blueHalf : redHalf;
        double body = Math.Exp(-Math.Log(2) * Math.Pow((nm - peakNm) / half, 2));
        if (nm <= peakNm)
            return body;
        double beyond = (nm - peakNm) / fwhmNm;
        return body + (tail * beyond * beyond * Math.Exp(1 - (beyond * beyond))); // greatest, and equal to tail, one FWHM beyond the peak
    }

    // Three excitons on a band rising towards the blue, over photon energy; the shell adds to the band.
    private static double Band(DemoLot lot, double nm)
    {
        double ev = EvNm / nm, first = EvNm / lot.ExcitonNm;
        double excitons = (0.6 * Level(0, 1)) + (0.5 * Level(0.15, 2.2)) + (0.5 * Level(0.33, 3));
        return excitons + (5 * Above(ev, first + 0.15, 0.03 + (0.3 * lot.WidthEv))) + (lot.Shell * 4 * Above(ev, lot.ShellEv, 0.05));

        double Level(double aboveEv, double widths) => Math.Exp(-0.5 * Math.Pow((ev - first - aboveEv) / (widths * lot.WidthEv), 2));
    }

    // A band edge blurred by its width: (w ln(1 + exp((E − E₀)/w)))^1.3, in eV.
    private static double Above(double ev, double edgeEv, double widthEv) =>
        Math.Pow(widthEv * Math.Log(1 + Math.Exp((ev - edgeEv) / widthEv)), 1.3);

    private static double Rise(double nm, double edgeNm, double widthNm) => 1 / (1 + Math.Exp(-(nm - edgeNm) / widthNm));

    private static double Bump(double nm, double centreNm, double widthNm) => Math.Exp(-0.5 * Math.Pow((nm - centreNm) / widthNm, 2));

    private static (string Name, string Text) File(
        string name, string quantity, string unit, string columns, double fromNm, double toNm, double stepNm, Func<double, double[]> valuesAt)
    {
        var text = new StringBuilder();
        text.Append(CultureInfo.InvariantCulture, $"# quantity: {quantity} (invented)\n# unit: {unit}\n# step: {stepNm} nm\n");
        text.Append("# source: invented for Dotcoat's demo; not a measurement of anything\n# licence: MIT as the project\n");
        text.Append("# obtained: made by tests/Dotcoat.Tests/Commands/DemoSpectra.cs\n");
        text.Append(CultureInfo.InvariantCulture, $"wavelength_nm,{columns}\n");
        for (double nm = fromNm; nm <= toNm; nm += stepNm)
            text.Append(CultureInfo.InvariantCulture, $"{nm},{string.Join(',', valuesAt(nm).Select(v => v.ToString("0.#####", CultureInfo.InvariantCulture)))}\n");
        return (name, text.ToString());
    }

    private sealed record DemoLot(
        string Stem, string Title, double PeakNm, double FwhmNm, double ExcitonNm, double WidthEv, double At450, double ShellEv, double Shell);
}
