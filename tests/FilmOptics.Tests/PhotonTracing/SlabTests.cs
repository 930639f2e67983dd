namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Scattering slabs without dots, against published and computed reflectance and transmittance.</summary>
public sealed class SlabTests
{
    private const long Photons = 200_000;

    [Fact]
    public void ReflectanceAndTransmittance_OfComputedSlabs_AreMetWithinFourErrors()
    {
        int rows = 0;
        foreach (string[] row in ReferenceRows.Of("slabs.csv"))
        {
            double[] numbers = [.. row.Skip(1).Take(8).Select(ReferenceRows.Number)];
            AssertSlab(row[0], numbers[..4], Incidence.Normal, numbers[4], numbers[5], 6e-8);
            AssertSlab(row[0], numbers[..4], Incidence.Lambertian, numbers[6], numbers[7], 6e-8);
            rows++;
        }

        Assert.Equal(30, rows);
    }

    [Theory]

    // Source: van de Hulst 1980, table 35, from memory: transmittance with the unscattered light.
    [InlineData(1, 2, 0.9, 0.75, 0.09739, 0.66096)]

    // Source: Sci. Rep. 2017, s41598-017-16966-2 (coefficients of a red-dot film, 100 µm, blue): reflectance and transmittance
    // computed, independent code; the reflectance printed leaves out the first face's 0.04.
    [InlineData(1.5, 0.66382, 0.44262, 0.4918, 0.06400, 0.54132)]
    public void ReflectanceAndTransmittance_OfPublishedSlabs_AreMet(
        double index, double thickness, double albedo, double g, double reflectance, double transmittance) =>
        AssertSlab("published", [index, thickness, albedo, g], Incidence.Normal, reflectance, transmittance, 5e-6);

    // Source: Giovanelli 1955, from memory, 0.2600 with the first face's 0.04; a slab of optical thickness 40 is as good as endless.
    [Fact]
    public void Reflectance_OfEndlessIsotropicMedium_IsGiovanellis() =>
        AssertSlab("endless", [1.5, 40, 0.9, 0], Incidence.Normal, 0.2600, 0, 5e-5);

    [Fact]
    public void ClearPlate_TransmitsWhatItsTwoFacesLeave()
    {
        // Closed form: all orders of reflection between two faces of reflectance r give (1 − r)/(1 + r), r = 0.04 at n = 1.5.
        AssertSlab("clear plate", [1.5, 1e-9, 1, 0], Incidence.Normal, 1 - (0.96 / 1.04), 0.96 / 1.04, 1e-9);
    }

    private static void AssertSlab(
        string name, double[] slab, Incidence incidence, double reflectance, double transmittance, double referenceError)
    {
        var film = ReferenceFilms.Slab(slab[0], slab[1], slab[2], slab[3], incidence);
        var output = new PhotonTracingModel(Photons, seed: 31).Solve(film, TestContext.Current.CancellationToken);
        var (budget, error) = (output.Budget, output.Tracing!.StandardError);
        string what = $"slab {name}, {incidence.Kind}";

        // An impossible fate is counted 0 times: half a photon is then the resolution.
        double resolution = referenceError + (0.5 / Photons);
        Agreement.AssertWithin(reflectance, resolution, budget.LostBelow, error.LostBelow, $"{what}, reflectance");
        Agreement.AssertWithin(transmittance, resolution, budget.Unconverted, error.Unconverted, $"{what}, transmittance");
        Agreement.AssertWithin(
            1 - reflectance - transmittance, resolution, budget.LostInHost, error.LostInHost, $"{what}, absorptance");
    }
}
