using CsCheck;

namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Traced films against the exact model, which shares nothing with the tracer but the film's description.</summary>
/// <remarks>
/// The rule: over all films the deviations of a budget line, each weighted by its expected value over its variance, sum to a normal number; that
/// may be 4 standard deviations (by chance once in 16 000), and so may the χ² of all lines of all films. The exact model's
/// own estimate counts as an error too.
/// </remarks>
public sealed class ExactModelAgreementTests
{
    private const int FilmCount = 40, AnyFilms = 15;
    private const long Photons = 2_000_000;
    private const double Allowed = 4;

    private static readonly string[] Main = ["unconverted", "converted", "lost_below", "lost_in_lots"];

    private static readonly (string Name, Func<PhotonBudget, double> Of)[] Lines =
    [
        ("unconverted", budget => budget.Unconverted),
        ("converted", budget => budget.Converted),
        ("lost_below", budget => budget.LostBelow),
        ("lost_above", budget => budget.LostAbove),
        ("lost_in_host", budget => budget.LostInHost),
        ("lost_at_edges", budget => budget.LostAtEdges),
        ("lost_in_lots", budget => budget.LostInLots.Sum()),
    ];

    [Fact]
    public void FortyRandomFilms_MeetTheExactModel_AndABiasOfAFifthOfAPercentWouldNot()
    {
        List<(PhotonBudget Exact, double ExactError, PhotonBudget Traced)> films = [];
        var random = new PCG(17, 2026);
        while (films.Count < FilmCount)
        {
            var film = FilmGenerators.Films.Generate(random, null, out _);
            if (film.Cavity.BelowReflectance.Samples[0] == 1 && film.Cavity.AboveReflectance.Samples[0] == 1)
                continue;

            // Random films seldom glow: beyond a few of any kind, those that do are taken.
            if (films.Count >= AnyFilms && new DiscreteOrdinatesModel(1e-2).Solve(film, TestContext.Current.CancellationToken).Budget.Converted < 0.1)
                continue;
            var exact = new DiscreteOrdinatesModel(2e-5).Solve(film, TestContext.Current.CancellationToken);
            if (exact.Accuracy!.EstimateShare <= 2e-5)
                films.Add((exact.Budget, exact.Accuracy.EstimateShare, new PhotonTracingModel(Photons, seed: (ulong)films.Count).Solve(film, TestContext.Current.CancellationToken).Budget));
        }

        double chiSquared = 0;
        int terms = 0;
        foreach (var (name, line) in Lines)
        {
            var rows = films.Select(film => (Exact: line(film.Exact), Traced: line(film.Traced), Error: film.ExactError)).ToArray();
            double fair = Deviation(rows, 1, 0);
            Assert.True(Math.Abs(fair) < Allowed, $"{name}: {fair:+0.0;-0.0} standard deviations over {FilmCount} films");
            foreach (var row in rows.Where(row => row.Exact is > 1e-4 and < 1 - 1e-4))
            {
                chiSquared += Math.Pow(row.Traced - row.Exact, 2) / Variance(row.Exact, row.Error);
                terms++;
            }

            // A main line would show a fifth of a percent of itself, any line a fifth of a percent of the source.
            if (Main.Contains(name, StringComparer.Ordinal))
                Assert.True(Math.Abs(Deviation(rows, 1.002, 0)) > Allowed, $"{name}: a bias of 0.2 % of the line gives only {Deviation(rows, 1.002, 0):0.0} standard deviations");
            Assert.True(Math.Abs(Deviation(rows, 1, 0.002)) > Allowed, $"{name}: a bias of 0.2 % of the source gives only {Deviation(rows, 1, 0.002):0.0} standard deviations");
        }

        Agreement.AssertChiSquared(chiSquared, terms, "all lines of all films");
    }

    private static double Deviation((double Exact, double Traced, double Error)[] rows, double factor, double offset)
    {
        double sum = 0, variance = 0;
        foreach (var row in rows)
        {
            double own = Variance(row.Exact, row.Error), weight = (row.Exact + 1e-3) / own;
            sum += weight * ((row.Traced * factor) + offset - row.Exact);
            variance += weight * weight * own;
        }

        return sum / Math.Sqrt(variance);
    }

    // A tenth of a photon keeps lines that cannot occur from having no error at all.
    private static double Variance(double share, double exactError) =>
        ((share * (1 - share)) + (0.1 / Photons)) / Photons + (exactError * exactError / 9);
}
