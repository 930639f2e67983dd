using System.Globalization;
using FilmOptics;

namespace FilmReports.Safety;

/// <summary>What has to be said about blue light, cadmium, lead and chemicals beside a film's figures.</summary>
public static class Cautions
{
    /// <summary>The text of the law that the figures stand beside.</summary>
    public const string TextOfLaw = "2011/65/EU with its annexes as amended up to Delegated Directive (EU) 2024/1416";

    /// <summary>Figures and statements for one film in sentences, most important first.</summary>
    public static IReadOnlyList<string> For(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return
        [
            .. BlueLight.Of(filmCase, appraisal).Select(Blue),
            .. RestrictedSubstances.Of(filmCase.Film).Select(Metals),
            .. Statements(filmCase.Film),
        ];
    }

    /// <summary>The statements that stand beside the figures.</summary>
    internal static IReadOnlyList<string> Statements(Film film)
    {
        var statements = new List<string>
        {
            "Blue light: these figures are no classification. That needs a calibrated measurement of the product by a competent laboratory. Do not look into an uncovered blue backlight.",
        };
        if (RestrictedSubstances.Of(film).Any(layer => layer.CadmiumUgPerMm2 is null || layer.LeadUgPerMm2 is null))
            statements.Add("A metal that is not given cannot be computed: a lot in the layer has no cadmium_mass_fraction or lead_mass_fraction. Not known is not none.");
        if (RestrictedSubstances.Of(film).Any(layer => (layer.CadmiumUgPerMm2 is not null && layer.CadmiumMgPerKg is null) || (layer.LeadUgPerMm2 is not null && layer.LeadMgPerKg is null)))
            statements.Add("mg/kg cannot be computed where the density of the host or of a lot is not given.");
        statements.Add(
            string.Create(
                CultureInfo.InvariantCulture,
                $"Cadmium and lead: the text read is {TextOfLaw}; the dot layer is taken as the homogeneous material. Its exemption 39(a) for dots in films (below {RestrictedSubstances.FormerExemptionUgPerMm2}\u2009µg of cadmium per mm² of screen) ")
                + "expired on 21 November 2025, and 39(b) is for dots on LED chips, not for films. Later changes are not considered: the law in force where you sell and a compliance officer decide.");
        statements.Add("Dots, solvents and monomers can harm: follow their safety data sheets, the rules of your site and your safety officer.");
        return statements;
    }

    private static string Blue(BlueLight light)
    {
        string share = light.ShortBlueShare is { } s
            ? string.Create(CultureInfo.InvariantCulture, $"{s * 100:0.0}\u2009% of the power between 400 and 500 nm lies in 415–455 nm")
            : "there is no power between 400 and 500 nm";
        string hazard = light.HazardWattPerLumen is { } h
            ? string.Create(CultureInfo.InvariantCulture, $"blue-light hazard {h * 1000:0.00} mW/lm (B(λ)-weighted, IEC 62471)")
            : "no visible light";
        return $"Blue light, {light.Light}: {share}; {hazard}.";
    }

    private static string Metals(RestrictedSubstances layer) =>
        $"{layer.LayerName}: {Metal("cadmium", layer.CadmiumMgPerKg, layer.CadmiumUgPerMm2)}; {Metal("lead", layer.LeadMgPerKg, layer.LeadUgPerMm2)}. {RestrictedSubstances.LimitText}";

    private static string Metal(string name, double? mgPerKg, double? ugPerMm2)
    {
        if (ugPerMm2 is not { } area)
            return $"{name} not known";
        string perArea = string.Create(CultureInfo.InvariantCulture, $"{area:0.0000} µg/mm²");
        return mgPerKg is { } mass ? string.Create(CultureInfo.InvariantCulture, $"{name} {mass:0} mg/kg, {perArea}") : $"{name} {perArea}";
    }
}
