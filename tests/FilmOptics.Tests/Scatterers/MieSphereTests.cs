using System.Globalization;
using System.Numerics;
using CsCheck;

namespace FilmOptics.Tests.Scatterers;

public sealed class MieSphereTests
{
    /// <summary>Index (n, k), size, then Qext, Qsca and g as printed.</summary>
    /// <remarks>
    /// Source: W. J. Wiscombe's test cases (1979/80) and C. F. Bohren, D. R. Huffman (1983), appendix A, as quoted; the rows with size 3,
    /// 1.5 at sizes 1 and 5: computed, independent code. The first row's size, 0.525 µm at 0.6328 µm, is printed as 5.212820.
    /// </remarks>
    public static TheoryData<double, double, double, string, string, string> PublishedRows => new()
    {
        { 1.55, 0, 2 * Math.PI * 0.525 / 0.6328, "3.10543", "3.10543", ".63314" },
        { 1.55, 0.1, 5.212820, "2.861652", "1.664249", ".801290" },
        { 1.5, 0, 10, "2.8820", "2.881999", ".742913" },
        { 1.5, 0, 100, "2.0944", "2.094388", ".818246" },
        { 1.5, 0, 1000, "2.0139", "2.013945", ".827882" },
        { 0.75, 0, 10, "2.232265", "2.232265", ".896473" },
        { 0.75, 0, 1000, "1.997908", "1.997908", ".844944" },
        { 1.33, 1e-5, 1, ".093952", ".093923", ".184517" },
        { 1.33, 1e-5, 100, "2.101321", "2.096594", ".868959" },
        { 1.33, 1e-5, 10000, "2.004089", "1.723857", ".907840" },
        { 1.5, 1, 0.055, ".101491", ".000011", ".000491" },
        { 1.5, 1, 1, "2.336321", ".663454", ".192136" },
        { 1.5, 1, 100, "2.097502", "1.283697", ".850252" },
        { 1.5, 1, 10000, "2.004368", "1.236574", ".846310" },
        { 10, 10, 1, "2.532993", "2.049405", "-.110664" },
        { 10, 10, 100, "2.071124", "1.836785", ".556215" },
        { 1.5, 0.5, 2.5, "2.562873", "1.097072", ".748906" },
        { 1.33, 1e-8, 3, "1.753397", "1.753397", ".783201" },
        { 1.5, 0, 1, ".215098", ".215098", ".198942" },
        { 1.5, 0, 5, "3.927827", "3.927827", ".707295" },
    };

    [Theory]
    [MemberData(nameof(PublishedRows))]
    public void Efficiencies_OfPublishedSpheres_AgreeToEveryPrintedDigit(
        double real, double imaginary, double size, string extinction, string scattering, string cosine)
    {
        // Both sign conventions of the absorbing part give the same sphere.
        foreach (int sign in new[] { -1, 1 })
        {
            var sphere = MieSphere.Of(size, new Complex(real, sign * imaginary));
            AssertPrinted(extinction, sphere.ExtinctionEfficiencyFactor, "Qext");
            AssertPrinted(scattering, sphere.ScatteringEfficiencyFactor, "Qsca");
            AssertPrinted(cosine, sphere.MeanCosine, "g");
        }
    }

    // Source: Bohren and Huffman 1983, appendix A: radius 0.525 µm, 0.6328 µm, m = 1.55.
    [Fact]
    public void Backscatter_OfPublishedSphere_AgreesToEveryPrintedDigit() =>
        AssertPrinted("2.92534", MieSphere.Of(2 * Math.PI * 0.525 / 0.6328, 1.55).BackscatterEfficiencyFactor, "Qback");

    // Source: Wiscombe's test case of a perfect conductor.
    [Fact]
    public void PerfectConductor_OfPublishedSize_AgreesToEveryPrintedDigit()
    {
        var sphere = MieSphere.PerfectConductor(100);
        AssertPrinted("2.008102", sphere.ScatteringEfficiencyFactor, "Qsca");
        AssertPrinted(".500926", sphere.MeanCosine, "g");
        Assert.Equal(sphere.ScatteringEfficiencyFactor, sphere.ExtinctionEfficiencyFactor, 1e-10);
    }

    [Theory]
    [InlineData(1e-2)]
    [InlineData(1e-3)]
    [InlineData(1e-4)]
    public void SmallSphere_ScattersAsRayleighsLaw(double size)
    {
        // Source: Rayleigh's limit, Qsca = (8/3) x⁴ |(m² − 1)/(m² + 2)|²; the next term is of relative order x².
        foreach (double index in new[] { 1.05, 1.5, 1.95, 0.75 })
        {
            double polarisability = ((index * index) - 1) / ((index * index) + 2);
            double rayleigh = 8.0 / 3 * Math.Pow(size, 4) * polarisability * polarisability;
            var sphere = MieSphere.Of(size, index);
            Assert.Equal(1, sphere.ScatteringEfficiencyFactor / rayleigh, 2 * size * size);
            Assert.Equal(1, sphere.ExtinctionEfficiencyFactor / rayleigh, (2 * size * size) + 1e-7);
            Assert.Equal(0, sphere.MeanCosine, size * size);
        }
    }

    [Fact]
    public void LargeAbsorbingSphere_RemovesTwiceItsShadow()
    {
        // Extinction paradox: Qext → 2, from above as x^(−2/3) (Bohren and Huffman 1983, section 4.4.3).
        double[] excess = [.. new[] { 1e2, 1e3, 1e4 }.Select(x => MieSphere.Of(x, new Complex(1.5, 1)).ExtinctionEfficiencyFactor - 2)];
        for (int i = 1; i < excess.Length; i++)
            Assert.InRange(excess[i] / excess[i - 1], 0.9 * Math.Pow(10, -2.0 / 3), 1.1 * Math.Pow(10, -2.0 / 3));
        Assert.InRange(excess[^1], 0, 0.005);
    }

    [Fact]
    public void ClearSpheres_LoseNothing() => Gen.Select(Gen.Double[0.001, 300], Gen.Double[0.5, 3]).Sample(
        (size, index) =>
        {
            var sphere = MieSphere.Of(size, index);
            double sum = sphere.ExtinctionEfficiencyFactor;
            return Math.Abs(sum - sphere.ScatteringEfficiencyFactor) <= 1e-10 * sum + 1e-17 && Math.Abs(sphere.MeanCosine) <= 1;
        },
        iter: 300);

    [Fact]
    public void AbsorbingSpheres_AbsorbAndScatterPositively() => Gen.Select(
        Gen.Double[0.01, 300], Gen.Double[0.5, 3], Gen.Double[1e-6, 3]).Sample(
        (size, index, absorbing) =>
        {
            var sphere = MieSphere.Of(size, new Complex(index, absorbing));
            return sphere.AbsorptionEfficiencyFactor > 0 && sphere.ScatteringEfficiencyFactor > 0 && Math.Abs(sphere.MeanCosine) <= 1;
        },
        iter: 300);

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(2e5)]
    [InlineData(double.NaN)]
    public void Size_OutOfRange_IsRefusedWithItsValue(double size)
    {
        var refusal = Assert.Throws<ArgumentOutOfRangeException>(() => MieSphere.Of(size, 1.5));
        Assert.Equal(size, refusal.ActualValue);
    }

    internal static void AssertPrinted(string printed, double computed, string what)
    {
        int decimals = printed.Length - 1 - printed.IndexOf('.', StringComparison.Ordinal);
        double value = double.Parse(printed, CultureInfo.InvariantCulture);
        Assert.True(
            Math.Abs(computed - value) <= 0.500001 * Math.Pow(10, -decimals),
            $"{what}: computed {computed:g10}, printed {printed}.");
    }
}
