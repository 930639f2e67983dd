using FilmOptics.DiscreteOrdinates;

namespace FilmOptics.Tests.DiscreteOrdinates;

/// <summary>Eight wavelengths in a register give what one at a time gives.</summary>
public sealed class LanesTests
{
    [Theory]
    [InlineData(0.0)]
    [InlineData(12.0)]
    public void WideLanes_GiveWhatSingleLanesGive(double scatteringPerMm)
    {
        var film = FilmGenerators.TwoLots();
        film = film with
        {
            Layers =
            [
                film.Layers[0] with { Scattering = Colorimetry.Spectrum.Flat<Colorimetry.PerMm>(scatteringPerMm, "scattering") },
                FilmGenerators.Layer(0.02, [], index: 1.65, hostPerMm: 0.01) with { Name = "barrier" },
                FilmGenerators.Layer(0.01, [], index: 1) with { Name = "gap" },
            ],
        };
        var layers = MergedLayer.Of(film);
        var plan = new FilmPlan(film, layers, new Effort(6, 8, 1), withAngles: true);
        var states = OpticalStates.At(film, layers, [.. Enumerable.Range(70, 19)]);
        // Near in absorption, so that no state needs thinner slices than its neighbours in the register.
        double longestMm = states.LongestFlightMm(film, layers);
        var (wide, single) = (new double[states.Count * plan.Rows * plan.Inputs], new double[states.Count * plan.Rows * plan.Inputs]);
        StateSolver<WideLanes>.Solve(plan, states, 0.03, longestMm, wide, TestContext.Current.CancellationToken);
        StateSolver<SingleLane>.Solve(plan, states, 0.03, longestMm, single, TestContext.Current.CancellationToken);
        Assert.All(wide.Zip(single), pair => Assert.Equal(pair.Second, pair.First, 1e-12));
        Assert.Contains(single, value => value > 0.1);
    }
}
