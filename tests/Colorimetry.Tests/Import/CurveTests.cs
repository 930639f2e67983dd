namespace Colorimetry.Tests.Import;

public sealed class CurveTests
{
    // Source: documented example of the Sprague interpolator of an open-source colour library (Python, BSD), which follows CIE 167:2005.
    // All three points lie in the first interval, where the values that CIE 167 adds beyond the ends decide.
    [Theory]
    [InlineData(0.5, 7.2185025)]
    [InlineData(0.25, 6.7295161)]
    [InlineData(0.75, 7.8140625)]
    public void Sprague_OfASecondLibrarysExample_Agrees(double share, double expected)
    {
        double[] values = [5.9200, 9.3700, 10.8135, 4.5100, 69.5900, 27.8007, 86.0500];
        Published.AssertWithin(expected, Sprague.At(Sprague.Extend(values), 0, share), 1e-7, "from the left");
        Array.Reverse(values);
        Published.AssertWithin(expected, Sprague.At(Sprague.Extend(values), values.Length - 2, 1 - share), 1e-7, "from the right");
    }

    // Worked by hand from Fritsch & Butland's slopes: for x² at 0, 1, 2 they are 0, 1.5 (harmonic mean of 1 and 3) and 4.
    [Theory]
    [InlineData(400.5, 0.3125)]
    [InlineData(401, 1)]
    [InlineData(401.5, 2.1875)]
    public void Monotone_OfAParabola_HasTheSlopesWorkedByHand(double nm, double expected) =>
        Assert.Equal(expected, new MonotoneCurve([400, 401, 402], [0, 1, 4]).At(nm), 12);

    // By hand: the three-point slope at the first row would be 4 and is kept to three secants, 3; the turn has slope 0.
    [Fact]
    public void Monotone_BeforeATurn_KeepsItsEndSlope() =>
        Assert.Equal(0.875, new MonotoneCurve([400, 401, 402], [0, 1, -4]).At(400.5), 12);

    // Closed form: the integral of the cubic through the parabola's rows, h/2 (y0 + y1) + h²/12 (m0 − m1) per interval.
    [Fact]
    public void Area_OfAMonotoneCurve_IsItsIntegral() => Assert.Equal(
        (0.5 + ((0 - 1.5) / 12)) + (2.5 + ((1.5 - 4) / 12)), new MonotoneCurve([400, 401, 402], [0, 1, 4]).Area(400, 402), 12);

    // By hand: from 400.5 to 401 (1.5 + 2)/2 × 0.5, from 401 to 404 (2 + 0.5)/2 × 3.
    [Fact]
    public void Area_OfAPart_IsThatOfTheTrapezia() => Assert.Equal(0.875 + 3.75, new LinearCurve([400, 401, 405], [1, 2, 0]).Area(400.5, 404), 12);
}
