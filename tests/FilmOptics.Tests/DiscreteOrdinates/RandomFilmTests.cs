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
            var output = new DiscreteOrdinatesModel().SolveAt(film, new Effort(4, 4), CancellationToken.None);
            output.Budget.RequireClosed(1e-10);
            Assert.Equal(output.Budget.Converted, output.ConvertedByLot.Sum(lot => lot.Integral), 1e-12);
        },
        iter: 10_000);

    [Theory]
    [InlineData(1e-3)]
    [InlineData(1e-4)]
    [InlineData(1e-5)]
    public void StatedError_Holds(double accuracyShare)
    {
        const int films = 200;
        int overAsked = 0, overEstimate = 0, reached = 0;
        string worst = "";
        FilmGenerators.Films.Sample(
            film =>
            {
                if (!CanEnd(film))
                    return;
                var output = new DiscreteOrdinatesModel(accuracyShare).Solve(film, CancellationToken.None);
                var reference = new DiscreteOrdinatesModel().SolveAt(film, new Effort(16, 32), CancellationToken.None);
                double error = OutputError.Between(output, reference);
                if (output.Accuracy!.EstimateShare > accuracyShare)
                    return;
                Interlocked.Increment(ref reached);
                if (error > accuracyShare)
                    Interlocked.Increment(ref overAsked);
                if (error > output.Accuracy.EstimateShare)
                {
                    Interlocked.Increment(ref overEstimate);
                    worst = $"{worst} {error:g2}>{output.Accuracy.EstimateShare:g2}";
                }
            },
            iter: films,
            seed: "0000KTrbCYU4");
        Assert.True(overAsked <= 0.01 * reached, $"{overAsked} of {reached} films are worse than the {accuracyShare} asked for; {worst}");
        Assert.True(overEstimate <= 0.05 * reached, $"{overEstimate} of {reached} films are worse than their estimate; {worst}");
        Assert.True(reached >= 0.6 * films, $"only {reached} of {films} films reached {accuracyShare}");
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
}
