using FilmOptics.DiscreteOrdinates;
using FilmOptics.Tests.PhotonTracing;

namespace FilmOptics.Tests.DiscreteOrdinates;

/// <summary>Scattering slabs without dots, against published and computed reflectance and transmittance.</summary>
public sealed class DiscreteSlabTests
{
    [Fact]
    public void ReflectanceAndTransmittance_OfComputedSlabs_AreMet()
    {
        int rows = 0;
        foreach (string[] row in ReferenceRows.Of("slabs.csv"))
        {
            double[] numbers = [.. row.Skip(1).Take(8).Select(ReferenceRows.Number)];
            AssertSlab(row[0], numbers[..4], Incidence.Normal, numbers[4], numbers[5], 2e-5);
            AssertSlab(row[0], numbers[..4], Incidence.Lambertian, numbers[6], numbers[7], 2e-5);
            rows++;
        }

        Assert.Equal(30, rows);
    }

    private static void AssertSlab(string name, double[] slab, Incidence incidence, double reflectance, double transmittance, double allowed)
    {
        var film = ReferenceFilms.Slab(slab[0], slab[1], slab[2], slab[3], incidence);
        var budget = new DiscreteOrdinatesModel().SolveAt(film, new Effort(16, 4, 1), TestContext.Current.CancellationToken).Budget;
        string what = $"slab {name}, {incidence.Kind}";
        Assert.True(Math.Abs(budget.LostBelow - reflectance) <= allowed, $"{what}: reflectance {budget.LostBelow}, expected {reflectance}");
        Assert.True(Math.Abs(budget.Unconverted - transmittance) <= allowed, $"{what}: transmittance {budget.Unconverted}, expected {transmittance}");
        budget.RequireClosed(1e-10);
    }
}
