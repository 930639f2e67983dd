using System.Globalization;
using FilmOptics;

namespace FilmReports.Safety;

/// <summary>Cadmium and lead of one layer that holds dots: the dot layer is the homogeneous material that the limit is written for.</summary>
/// <param name="LayerName">The layer.</param>
/// <param name="CadmiumMgPerKg">mg of cadmium per kg of cured layer; null where a density or a mass fraction is unknown.</param>
/// <param name="LeadMgPerKg">The same for lead.</param>
/// <param name="CadmiumUgPerMm2">µg of cadmium per mm² of screen; null where a mass fraction is unknown.</param>
/// <param name="LeadUgPerMm2">The same for lead.</param>
public sealed record RestrictedSubstances(
    string LayerName, double? CadmiumMgPerKg, double? LeadMgPerKg, double? CadmiumUgPerMm2, double? LeadUgPerMm2)
{
    /// <summary>Limit for cadmium in a homogeneous material, mg/kg (2011/65/EU, Annex II).</summary>
    public const double CadmiumLimitMgPerKg = 100;

    /// <summary>Limit for lead in a homogeneous material, mg/kg (2011/65/EU, Annex II).</summary>
    public const double LeadLimitMgPerKg = 1000;

    /// <summary>Figure of the former exemption 39(a) for downshifting dots in displays, µg/mm² of screen; expired on 21 November 2025.</summary>
    public const double FormerExemptionUgPerMm2 = 0.2;

    /// <summary>The limits in words.</summary>
    internal static string LimitText { get; } = string.Create(
        CultureInfo.InvariantCulture, $"2011/65/EU allows {CadmiumLimitMgPerKg}\u2009mg/kg cadmium and {LeadLimitMgPerKg}\u2009mg/kg lead in a homogeneous material.");

    /// <summary>One entry for each layer that holds dots.</summary>
    public static IReadOnlyList<RestrictedSubstances> Of(Film film)
    {
        ArgumentNullException.ThrowIfNull(film);
        return [.. film.Layers.Where(layer => layer.Dots.Count > 0).Select(Of)];
    }

    private static RestrictedSubstances Of(Layer layer)
    {
        double? cadmium = ElementMgPerMl(layer, lot => lot.CadmiumMassShare), lead = ElementMgPerMl(layer, lot => lot.LeadMassShare);
        double? density = Loadings.DensityGPerMl(layer);
        // mg/mL ÷ g/mL = mg/g; 1 mg/mL over 1 mm is 1 µg/mm².
        return new(layer.Name, cadmium / density * 1000, lead / density * 1000, cadmium * layer.ThicknessMm, lead * layer.ThicknessMm);
    }

    private static double? ElementMgPerMl(Layer layer, Func<DotLot, double?> massShare)
    {
        double sum = 0;
        foreach (var dots in layer.Dots.Where(dots => dots.LoadingMgPerMl > 0))
        {
            if (massShare(dots.Lot) is not { } share)
                return null;
            sum += dots.LoadingMgPerMl * share;
        }

        return sum;
    }
}
