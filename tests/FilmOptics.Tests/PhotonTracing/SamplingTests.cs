using System.Globalization;
using System.Runtime.Intrinsics;
using FilmOptics.PhotonTracing;
using MathNet.Numerics.Integration;

namespace FilmOptics.Tests.PhotonTracing;

/// <summary>What is drawn follows its law.</summary>
public sealed class SamplingTests
{
    private const int Draws = 400_000;

    [Theory]
    [InlineData(-0.9)]
    [InlineData(-0.3)]
    [InlineData(0)]
    [InlineData(0.5)]
    [InlineData(0.8)]
    [InlineData(0.99)]
    public void HenyeyGreenstein_HasItsMeanCosineAndItsCumulative(double g)
    {
        var random = Xoshiro256.ForBlock(1, 0);
        double sum = 0, squares = 0;
        for (int i = 0; i < Draws; i++)
        {
            double cosine = 1 - HenyeyGreenstein.DrawVersine(g, random.NextShare());
            Assert.InRange(cosine, -1, 1);
            sum += cosine;
            squares += cosine * cosine;
        }

        // Source: the definition of g; the second moment of the function is (1 + 2 g²)/3, from its Legendre coefficients gⁿ.
        double spread = Math.Sqrt((((1 + (2 * g * g)) / 3) - (g * g)) / Draws);
        Agreement.AssertWithin(g, 0, sum / Draws, spread, "mean cosine");
        Agreement.AssertWithin((1 + (2 * g * g)) / 3, 0, squares / Draws, 1 / Math.Sqrt(Draws), "mean square cosine");
    }

    [Theory]
    [InlineData(-0.5)]
    [InlineData(0.4)]
    [InlineData(0.97)]
    public void HenyeyGreenstein_InvertsItsCumulative(double g)
    {
        // The textbook cumulative: C(cos θ) = (1 − g²)/(2g) (1/√(1 + g² − 2 g cos θ) − 1/(1 + g)).
        for (double share = 0.01; share < 1; share += 0.01)
        {
            double cosine = 1 - HenyeyGreenstein.DrawVersine(g, share);
            double cumulative = (1 - (g * g)) / (2 * g) * ((1 / Math.Sqrt(1 + (g * g) - (2 * g * cosine))) - (1 / (1 + g)));
            Assert.Equal(share, cumulative, 1e-10);
        }
    }

    // Source: closed form by Walsh, computed, independent code: external diffuse reflectance of a face for Lambertian light.
    [Theory]
    [InlineData(1.40, ".07681")]
    [InlineData(1.45, ".08437")]
    [InlineData(1.50, ".09178")]
    [InlineData(1.55, ".09907")]
    [InlineData(1.60, ".10625")]
    public void Fresnel_OverLambertianLight_ReflectsThePrintedShares(double index, string external)
    {
        double Outside(double cosine) => 2 * cosine * FresnelFace.Reflectance(1 / index, cosine, out _);
        double Inside(double cosine) => 2 * cosine * FresnelFace.Reflectance(index, cosine, out _);
        double critical = Math.Sqrt(1 - (1 / (index * index)));
        double reflected = GaussLegendreRule.Integrate(Outside, 0, 0.05, 64) + GaussLegendreRule.Integrate(Outside, 0.05, 1, 64);
        double expected = double.Parse(external, CultureInfo.InvariantCulture);
        Assert.Equal(expected, reflected, 0.5001e-5);

        // From inside: all beyond the critical angle, and by reciprocity 1 − (1 − R)/n² in all.
        double inside = (critical * critical) + GaussLegendreRule.Integrate(c => Inside(critical + ((1 - critical) * c * c)) * 2 * c * (1 - critical), 0, 1, 128);
        Assert.Equal(1 - ((1 - reflected) / (index * index)), inside, 1e-6);
    }

    [Fact]
    public void Fresnel_AtNormalBrewsterAndGrazing_IsTextbook()
    {
        Assert.Equal(0.04, FresnelFace.Reflectance(1 / 1.5, 1, out _), 1e-15);
        double brewster = Math.Cos(Math.Atan(1.5));

        // At Brewster's angle only one polarisation is reflected: ((n² − 1)/(n² + 1))²/2.
        Assert.Equal(Math.Pow((2.25 - 1) / (2.25 + 1), 2) / 2, FresnelFace.Reflectance(1 / 1.5, brewster, out _), 1e-14);
        Assert.Equal(1, FresnelFace.Reflectance(1 / 1.5, 1e-9, out _), 1e-8);
        Assert.Equal(0, FresnelFace.Reflectance(1, 1e-9, out double behind));
        Assert.Equal(1e-9, behind, 1e-20);
        Assert.Equal(1, FresnelFace.Reflectance(1.5, 0.7, out _));
    }

    [Fact]
    public void LambertianAndProfileIncidence_FollowTheirFlux()
    {
        var table = new AngleTable([0, 30, 90], [0, 1, 0.2], "invented profile");
        double radiance(double angle) => table.At(Math.Cos(angle));
        double flux(double from, double to, Func<double, double> l) =>
            GaussLegendreRule.Integrate(a => l(a) * Math.Sin(a) * Math.Cos(a), from, to, 64);
        double turn = Math.PI / 6;
        double profileBelow30 = flux(0, turn, radiance) / (flux(0, turn, radiance) + flux(turn, 3 * turn, radiance));
        foreach ((Incidence incidence, double below30) in new[]
                 {
                     (Incidence.Lambertian, 0.25), (new Incidence(IncidenceKind.Profile, table), profileBelow30), (Incidence.Normal, 1.0),
                 })
        {
            var sampler = new IncidenceSampler(incidence);
            var random = Xoshiro256.ForBlock(2, 0);
            int below = 0;
            for (int i = 0; i < Draws; i++)
                below += sampler.DrawCosine(ref random) > Math.Cos(turn) ? 1 : 0;
            double share = below / (double)Draws;
            Agreement.AssertWithin(below30, 1e-9, share, Math.Sqrt(below30 * (1 - below30) / Draws), $"{incidence.Kind} within 30 degrees");
        }
    }

    [Fact]
    public void AliasTable_DrawsItsWeights()
    {
        double[] weights = [0, 3, 0.001, 0, 7, 1e-12, 0];
        var table = new AliasTable(weights);
        var random = Xoshiro256.ForBlock(3, 0);
        var counts = new int[weights.Length];
        for (int i = 0; i < Draws; i++)
            counts[table.Draw(random.NextShare())]++;
        for (int i = 0; i < weights.Length; i++)
        {
            double share = weights[i] / weights.Sum();
            Agreement.AssertWithin(share, 1e-11, counts[i] / (double)Draws, Math.Sqrt(share * (1 - share) / Draws), $"weight {i}");
            Assert.True(weights[i] > 0 || counts[i] == 0, $"weight {i} is 0");
        }
    }

    [Fact]
    public void LaneFunctions_AreRightToSinglePrecision()
    {
        for (int k = 0; k < 1 << 23; k += 997)
        {
            float share = (k + 0.5f) / (1 << 23);
            double log = -Math.Log(share), cosine = Math.Cos(Math.PI * share);
            Assert.Equal(log, LaneMath.MinusLog(Vector512.Create(share))[3], 3e-7 * log);
            Assert.Equal(cosine, LaneMath.CosineOfHalfTurns(Vector512.Create(share))[7], 3e-7);
        }
    }

    [Fact]
    public void FoldedFlight_EndsWhereAFlightFromFaceToFaceEnds()
    {
        CsCheck.Check.Sample(
            CsCheck.Gen.Select(CsCheck.Gen.Double[0.01, 0.99], CsCheck.Gen.Double[0.001, 40]),
            (start, rise) =>
            {
                double depth = start, left = rise;
                bool up = true;
                while (true)
                {
                    double ahead = up ? 1 - depth : depth;
                    if (left <= ahead)
                        break;
                    left -= ahead;
                    depth = up ? 1 : 0;
                    up = !up;
                }

                depth += up ? left : -left;
                double folded = GuidedFlight.Fold(start, rise, 1, 0.5, out bool turned);
                Assert.Equal(!up, turned);
                Assert.Equal(depth, turned ? 1 - folded : folded, 1e-9);
            });
    }
}
