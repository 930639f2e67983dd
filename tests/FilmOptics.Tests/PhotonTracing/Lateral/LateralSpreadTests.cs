using Colorimetry;
using CsCheck;

namespace FilmOptics.Tests.PhotonTracing.Lateral;

public sealed class LateralSpreadTests
{
    private static readonly Lazy<LateralSpread> CaseD = new(
        () => LateralSpread.Trace(ReferenceFilms.CaseD, 150_000, seed: 51, cancellationToken: TestContext.Current.CancellationToken));

    [Fact]
    public void ClearGapUnderLambertianLight_SpreadsAsTheTangent()
    {
        // Closed form: r = d tan θ, and Lambertian flux within θ is sin²θ: r²/(d² + r²). Half within d, 90 % within 3 d.
        var gap = ReferenceFilms.Slab(1, 1e-12, 1, 0, Incidence.Lambertian);
        var spread = LateralSpread.Trace(gap, 200_000, seed: 52, cancellationToken: TestContext.Current.CancellationToken).Colours[0];
        Assert.Equal(1, spread.Photons);
        Agreement.AssertWithin(1, 1e-3, spread.Radius50Mm!.Value, spread.Radius50ErrorMm!.Value, "radius of half");
        Agreement.AssertWithin(3, 3e-3, spread.Radius90Mm!.Value, spread.Radius90ErrorMm!.Value, "radius of 90 %");
    }

    [Fact]
    public void ThickPureScatterer_SpreadsAsDiffusionTheorySays()
    {
        // Diffusion between extrapolated faces ze = 0.7104 ℓ* behind the true ones (Milne), source at depth ℓ*, no absorption. The
        // two-dimensional transform of the light leaving is sinh(q a) cosh(q ze)/sinh(q L), a = ze + ℓ*, L = d + 2 ze, whose curvature gives
        // ⟨r²⟩ = 2/3 (L² − a²) − 2 ze². From memory of the method (e.g. Contini, Martelli & Zaccanti 1997); algebra our own.
        const double transportLength = 1, thickness = 20, extrapolation = 0.7104 * transportLength;
        double length = thickness + (2 * extrapolation), source = extrapolation + transportLength;
        double expected = (2.0 / 3 * ((length * length) - (source * source))) - (2 * extrapolation * extrapolation);
        var film = ReferenceFilms.Slab(1, thickness / transportLength, 1, 0, Incidence.Normal);
        film = film with
        {
            Layers = [film.Layers[0] with { ThicknessMm = thickness, Scattering = ReferenceFilms.Flat<PerMm>(1 / transportLength) }],
        };
        var spread = LateralSpread.Trace(film, 100_000, seed: 53, cancellationToken: TestContext.Current.CancellationToken);
        Assert.Equal(1, spread.MeanSquareMm2 / expected, 0.04);
    }

    [Fact]
    public void AnisotropicScatterer_SpreadsAsItsReducedOne()
    {
        // Diffusion knows only s (1 − g). The first flight still differs, which a thick film forgets.
        var film = ReferenceFilms.Slab(1, 20, 1, 0, Incidence.Normal);
        var forward = film with
        {
            Layers = [film.Layers[0] with { Scattering = ReferenceFilms.Flat<PerMm>(100), Anisotropy = ReferenceFilms.Flat<MeanCosine>(0.8) }],
        };
        double isotropic = LateralSpread.Trace(film, 60_000, seed: 54, cancellationToken: TestContext.Current.CancellationToken).MeanSquareMm2;
        double reduced = LateralSpread.Trace(forward, 60_000, seed: 55, cancellationToken: TestContext.Current.CancellationToken).MeanSquareMm2;
        Assert.Equal(1, reduced / isotropic, 0.06);
    }

    [Fact]
    public void EndlessZone_GivesTheLightOfTheWholeFilm()
    {
        const double endless = 1e9;
        var output = new PhotonTracingModel(500_000, seed: 56).Solve(ReferenceFilms.CaseD, TestContext.Current.CancellationToken);
        var light = CaseD.Value.LightAt(new(-endless, endless, -endless, endless));
        double share = light.Integral, error = Math.Sqrt(share * (1 - share) / CaseD.Value.Photons);
        double expected = output.Total.Integral;
        Agreement.AssertWithin(
            expected, Math.Sqrt(expected * (1 - expected) / output.Tracing!.Photons), share, error, "light of an endless zone");
    }

    [Fact]
    public void SquareZone_IsTheSumOfItsQuarters() => Gen.Select(
        Gen.Double[0.05, 30], Gen.Double[-20, 20], Gen.Double[-20, 20]).Sample(
        (side, x, y) =>
        {
            var whole = CaseD.Value.LightAt(new(x, x + side, y, y + side)).Integral;
            double half = side / 2, quarters = 0;
            foreach ((double dx, double dy) in new[] { (0.0, 0.0), (half, 0), (0, half), (half, half) })
                quarters += CaseD.Value.LightAt(new(x + dx, x + dx + half, y + dy, y + dy + half)).Integral;
            Assert.Equal(whole, quarters, 1e-12);
        },
        iter: 30);

    [Fact]
    public void ShareOfCircle_IsThatCountedAroundIt() => Gen.Select(
        Gen.Double[-2, 2], Gen.Double[0.01, 3], Gen.Double[-2, 2], Gen.Double[0.01, 3]).Sample(
        (left, width, bottom, height) =>
        {
            const int angles = 20_000;
            int inside = Enumerable.Range(0, angles).Count(i =>
            {
                (double y, double x) = Math.SinCos(2 * Math.PI * (i + 0.5) / angles);
                return x > left && x < left + width && y > bottom && y < bottom + height;
            });
            Assert.Equal((double)inside / angles, new LitZone(left, left + width, bottom, bottom + height).ShareOfCircle(1), 5.0 / angles);
        },
        iter: 50);

    [Fact]
    public void ZoneProfile_OfAWideZone_IsWholeInsideHalfAtTheEdgeAndNothingFarOut()
    {
        var profile = CaseD.Value.AcrossZone(20, StandardObserver.Cie1931, [0, 5, 10, 15, 40]);
        double[] light = [.. profile.Points.Select(point => point.LuminanceShare)];
        Assert.InRange(light[0], 0.99, 1);
        Agreement.AssertWithin(0.5, 1e-3, light[2], profile.Points[2].LuminanceErrorShare, "luminance at the edge");
        Assert.InRange(light[4], 0, 1e-3);
        for (int i = 1; i < light.Length; i++)
            Assert.True(light[i] <= light[i - 1], $"{light[i]} after {light[i - 1]}");
    }

    [Fact]
    public void Halo_OfAZone_IsYellowerThanItsMiddle()
    {
        // Converted light is emitted in all directions and travels farther than the blue: further out x and y rise.
        var points = CaseD.Value.AcrossZone(20, StandardObserver.Cie1931, [0, 10.2]).Points;
        Assert.True(points[1].Chromaticity!.Value.X > points[0].Chromaticity!.Value.X + 0.01);
        Assert.True(points[1].Chromaticity!.Value.Y > points[0].Chromaticity!.Value.Y + 0.01);
    }

    [Fact]
    public void SameSeed_OnOneAndTwoThreads_GivesTheSameBits()
    {
        var profiles = new[] { 1, 2 }.Select(threads => LateralSpread.Trace(
            ReferenceFilms.CaseC, 40_000, seed: 57, threads, cancellationToken: TestContext.Current.CancellationToken)
            .AcrossZone(5, StandardObserver.Cie1931).Points).ToArray();
        Assert.Equal(profiles[0], profiles[1]);
    }

    [Fact]
    public void CutEdgeOfAClearGap_LosesHalfItsThickness()
    {
        // Closed form: sideways flights of Lambertian light go beyond x on one side with chance (1 − x/√(x² + d²))/2, which integrates to d/2;
        // up to the lit width X = 2 reach, to (X − √(X² + d²) + d)/2.
        const double reach = 50, lit = 2 * reach;
        var gap = ReferenceFilms.Slab(1, 1e-12, 1, 0, Incidence.Lambertian);
        var edge = SheetEdge.Trace(
            gap, reach, StandardObserver.Cie1931, 400_000, seed: 58, bands: 100, TestContext.Current.CancellationToken);
        Agreement.AssertWithin((lit - Math.Sqrt((lit * lit) + 1) + 1) / 2, 0, edge.LostWidthMm, edge.LostWidthErrorMm, "width lost");

        // In the middle of the reach as much strays in as out; along the edge half of the oblique light is missing.
        Agreement.AssertWithin(1, 1e-3, edge.Bands[50].Photons, edge.Bands[50].PhotonsError, "light far from the edge");
        Assert.InRange(edge.Bands[0].Photons, 0.5, 0.7);
    }
}
