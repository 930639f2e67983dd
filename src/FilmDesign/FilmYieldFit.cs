using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>The yield in film that explains the external yield of a piece of film in an integrating sphere.</summary>
/// <remarks>
/// The piece hangs in the dark: what leaves either face or a cut edge is counted by the sphere and does not come back. Light is
/// guided and re-absorbed inside, so its external yield lies below that of its dots.
/// </remarks>
/// <param name="LotName">The lot.</param>
/// <param name="FilmYieldFactor">film_yield_factor that explains the measurement.</param>
/// <param name="UncertaintyFactor">Its standard uncertainty, from that of the external yield alone.</param>
/// <param name="FilmYieldShare">Quantum yield in the film, with that factor.</param>
/// <param name="AbsorptanceShare">Share of the collimated pump light that the piece absorbs, computed: to hold against the measured one.</param>
/// <param name="Model">Model that made it.</param>
public sealed record FilmYieldFit(
    string LotName, double FilmYieldFactor, double UncertaintyFactor, double FilmYieldShare, double AbsorptanceShare, string Model)
{
    private const double FactorTolerance = 1e-6, SlopeStep = 1e-3;

    /// <summary>Finds the factor of one lot.</summary>
    /// <param name="film">The film; its cavity and backlight do not matter here.</param>
    /// <param name="lotName">The lot whose factor is wanted.</param>
    /// <param name="pump">The exciting light, photons per nm.</param>
    /// <param name="externalYieldShare">Photons leaving per photon absorbed, measured.</param>
    /// <param name="uncertaintyShare">Its standard uncertainty.</param>
    /// <param name="model">Model of light.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <exception cref="InputException">The film has no such lot, absorbs nothing of the pump, or no yield up to 1 explains the measurement.</exception>
    public static FilmYieldFit Of(
        Film film, string lotName, Spectrum<PhotonPerNm> pump, double externalYieldShare, double uncertaintyShare, IFilmModel model, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        ArgumentNullException.ThrowIfNull(pump);
        ArgumentNullException.ThrowIfNull(model);
        var lot = film.Lots.FirstOrDefault(candidate => string.Equals(candidate.Name, lotName, StringComparison.Ordinal))
            ?? throw Fault(film, $"has no lot '{lotName}'; it has {string.Join(", ", film.Lots.Select(candidate => $"'{candidate.Name}'"))}.");
        var dark = film with
        {
            Backlight = film.Backlight with { Photons = pump.NormalisedToUnitSum(), Incidence = Incidence.Normal },
            Cavity = new(
                Spectrum.Flat<Fraction>(0, "the dark"), Spectrum.Flat<Fraction>(0, "the dark"), Spectrum.Flat<Fraction>(0, "the dark"), 0),
        };

        // Light that the host takes of the pump is that of the same film without emission.
        var silent = model.Solve(WithYields(dark, _ => 0), cancellationToken).Budget;
        double absorbed = silent.SourceAbsorbedBy.Sum() + silent.LostInHost;
        if (!(silent.SourceAbsorbedBy.Sum() > 0))
            throw Fault(film, "absorbs nothing of the pump light in its dots, so that it has no yield.");
        double External(double factor)
        {
            var budget = model.Solve(WithFactor(dark, lot, factor), cancellationToken).Budget;
            return (budget.SourceAbsorbedBy.Sum() - budget.LostInLots.Sum() - (budget.LostInHost - silent.LostInHost)) / absorbed;
        }

        double most = 1 / lot.QuantumYieldShare, low = 0, high = most;
        double lowest = External(0), highest = External(most);
        if (!(externalYieldShare >= lowest && externalYieldShare <= highest))
        {
            throw Fault(film, FormattableString.Invariant(
                $"an external yield of {externalYieldShare:0.000} is not reached by lot '{lotName}' alone: from none to a perfect yield in the film it would be {lowest:0.000} to {highest:0.000}. Check loadings, scattering and the other lots, and the sphere's response."));
        }

        while (high - low > FactorTolerance * most)
        {
            double middle = (low + high) / 2;
            (low, high) = External(middle) < externalYieldShare ? (middle, high) : (low, middle);
        }

        double found = (low + high) / 2, step = SlopeStep * most;
        double below = Math.Max(0, found - step), above = Math.Min(most, found + step);
        double slope = (External(above) - External(below)) / (above - below);
        return new(lotName, found, uncertaintyShare / slope, found * lot.QuantumYieldShare, absorbed, model.Name);
    }

    private static Film WithFactor(Film film, DotLot lot, double factor) =>
        WithYields(film, old => old.Name == lot.Name ? old.QuantumYieldShare * factor : old.FilmYieldShare);

    private static Film WithYields(Film film, Func<DotLot, double> yieldShare)
    {
        DotLot[] lots = [.. film.Lots.Select(lot => lot with { QuantumYieldShare = yieldShare(lot), FilmYieldFactor = 1 })];
        return film with
        {
            Lots = lots,
            Layers = [.. film.Layers.Select(layer => layer with { Dots = [.. layer.Dots.Select(dots => dots with { Lot = lots[film.IndexOf(dots.Lot)] })] })],
        };
    }

    private static InputException Fault(Film film, string message) => new(new InputFault(film.Title, null, null, message));
}
