using System.Globalization;
using FilmOptics;

namespace FilmReports.Safety;

/// <summary>What has to be said about blue light, cadmium, lead and chemicals beside a film's figures.</summary>
public static class Cautions
{
    /// <summary>The statements for one film, most important first.</summary>
    public static IReadOnlyList<string> For(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return
        [
            Blue(appraisal),
            .. RestrictedSubstances.Of(filmCase.Film).Select(Metals),
            "Cadmium and lead figures stand beside 2011/65/EU as amended by Delegated Directive (EU) 2024/1416 (text read in 2026): 100 mg/kg cadmium and 1000 mg/kg lead in a homogeneous material; "
                + "exemption 39(a) for dots in films (below 0.2 µg Cd per mm² of screen) expired on 21 November 2025. The law in force where you sell and a compliance officer decide.",
            "Dots, solvents and monomers are hazardous: follow their safety data sheets, local rules and your safety officer. Do not look into an uncovered blue backlight.",
        ];
    }

    private static string Blue(FilmAppraisal appraisal)
    {
        var blue = BlueLight.Of(appraisal.Power);
        string share = blue.ShortBlueShare is { } s
            ? string.Create(CultureInfo.InvariantCulture, $"415–455 nm carries {s * 100:0.0} % of the power between 400 and 500 nm")
            : "there is no power between 400 and 500 nm";
        string hazard = blue.HazardWattPerLumen is { } h
            ? string.Create(CultureInfo.InvariantCulture, $"blue-light-hazard weighted power is {h * 1000:0.000} mW/lm (IEC 62471 weighting)")
            : "no visible light";
        return $"Blue light of the film's white: {share}; {hazard}. These figures are no classification: that needs a calibrated measurement of the product by a competent laboratory.";
    }

    private static string Metals(RestrictedSubstances layer) =>
        $"{layer.LayerName}: cadmium {Amount(layer.CadmiumMgPerKg, layer.CadmiumUgPerMm2, "cadmium_mass_fraction")}; lead {Amount(layer.LeadMgPerKg, layer.LeadUgPerMm2, "lead_mass_fraction")}.";

    private static string Amount(double? mgPerKg, double? ugPerMm2, string key)
    {
        if (ugPerMm2 is not { } area)
            return $"not known ({key} is missing for a lot)";
        string perArea = string.Create(CultureInfo.InvariantCulture, $"{area:0.0000} µg per mm² of screen");
        return mgPerKg is { } mass
            ? string.Create(CultureInfo.InvariantCulture, $"{mass:0} mg/kg of the layer, {perArea}")
            : $"{perArea}; mg/kg not known (a density is missing)";
    }
}
