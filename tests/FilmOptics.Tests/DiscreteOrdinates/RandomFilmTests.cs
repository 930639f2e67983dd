using Colorimetry;
using CsCheck;
using FilmOptics.DiscreteOrdinates;

namespace FilmOptics.Tests.DiscreteOrdinates;

/// <summary>What must hold in any film: closed budgets at any effort, and errors no larger than stated.</summary>
public sealed class DiscreteRandomFilmTests
{
    [Fact]
    public void Budget_OfAnyFilmAtAnyEffort_Closes() => FilmGenerators.Films.Sample(
        film =>
        {
            if (!CanEnd(film))
                return;
            var output = new DiscreteOrdinatesModel().SolveAt(film, new Effort(4, 4, 5), CancellationToken.None);
            output.Budget.RequireClosed(1e-10);
            Assert.Equal(output.Budget.Converted, output.ConvertedByLot.Sum(lot => lot.Integral), 1e-12);
        },
        iter: 10_000);

    [Fact]
    public void StatedError_Holds()
    {
        const int films = 200;
        Tally[] tallies = [new(1e-3), new(3e-4), new(1e-4), new(1e-5)];

        // The same films each time: at a rate of one film in 300, a fresh draw would be over the limit once in ten runs by chance.
        var random = new PCG(3, 2026);
        Parallel.ForEach([.. Enumerable.Range(0, films).Select(_ => FilmGenerators.Films.Generate(random, null, out Size _)).Where(CanEnd)], film =>
        {
            var reference = new DiscreteOrdinatesModel().SolveAt(film, new Effort(16, 32, 1), CancellationToken.None);
            foreach (var tally in tallies)
                tally.Take(film, reference);
        });
        foreach (var tally in tallies)
        {
            Assert.True(tally.OverAsked <= 0.01 * tally.Reached, tally.ToString());
            Assert.True(tally.OverEstimate <= 0.05 * tally.Reached, tally.ToString());
            Assert.True(tally.Reached >= 0.6 * films, tally.ToString());
        }
    }

    [Fact]
    public void LightThatCanNeverLeave_IsRefusedByItsWavelength()
    {
        var film = FilmGenerators.Film([FilmGenerators.Layer(0.1, [], scatteringPerMm: 1)], [], FilmGenerators.Cavity(1, 1));
        var refused = Assert.Throws<InputException>(() => new DiscreteOrdinatesModel().Solve(film, TestContext.Current.CancellationToken));
        Assert.Contains("can never leave", refused.Message, StringComparison.Ordinal);
    }

    // Both returns 1 and nothing that absorbs: no model has an answer, and the next test sees it refused.
    private static bool CanEnd(Film film) => film.Cavity.BelowReflectance.Samples[0] < 1 || film.Cavity.AboveReflectance.Samples[0] < 1;

    // How an accuracy fared; films that say they did not reach it do not count.
    private sealed class Tally(double accuracyShare)
    {
        private readonly Lock _lock = new();
        private string _worst = "";

        public int Reached { get; private set; }

        public int OverAsked { get; private set; }

        public int OverEstimate { get; private set; }

        public void Take(Film film, FilmOutput reference)
        {
            var output = new DiscreteOrdinatesModel(accuracyShare).Solve(film, CancellationToken.None);
            double error = OutputError.Between(output, reference), estimate = output.Accuracy!.EstimateShare;
            if (estimate > accuracyShare)
                return;
            lock (_lock)
            {
                Reached++;
                OverAsked += error > accuracyShare ? 1 : 0;
                OverEstimate += error > estimate ? 1 : 0;
                _worst += error > estimate ? FormattableString.Invariant($" {error:g2}>{estimate:g2}") : "";
            }
        }

        public override string ToString() =>
            FormattableString.Invariant($"at {accuracyShare}: {Reached} films reached it, {OverAsked} are worse than that, {OverEstimate} worse than their estimate:{_worst}");
    }
}
