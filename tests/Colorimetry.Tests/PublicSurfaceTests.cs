using System.Reflection;

namespace Colorimetry.Tests;

/// <summary>Rules of the public API that a reviewer would forget.</summary>
public sealed class PublicSurfaceTests
{
    // What a double says of itself at the door: its unit, or that it has none.
    private static readonly string[] Units =
        ["Nm", "Mm", "Um", "Cm", "Kelvin", "Deg", "W", "Watt", "Lumen", "LumenPerWatt", "Joule", "Photons", "Xy", "Uv", "Duv", "Mired", "De", "Share", "Factor", "Cosine"];

    // Coordinates have no unit, and "value" is allowed where the unit stands in the type argument.
    private static readonly string[] Coordinates = ["x", "y", "z", "u", "v", "l", "a", "b", "uPrime", "vPrime", "xBar", "yBar", "zBar", "uStar", "vStar", "aStar", "bStar"];

    private static IEnumerable<Type> PublicTypes => typeof(SpectrumFile).Assembly.GetExportedTypes();

    private static IEnumerable<MethodBase> PublicMethods => PublicTypes
        .Where(t => !typeof(Delegate).IsAssignableFrom(t) && !t.IsEnum)
        .SelectMany(t => t.GetMethods(BindingFlags.Public | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly).Cast<MethodBase>()
            .Concat(t.GetConstructors()))
        .Where(m => !m.IsSpecialName || m is ConstructorInfo)
        // Deconstruct repeats the names of a record's constructor.
        .Where(m => m.Name != "Deconstruct");

    [Fact]
    public void EveryDoubleParameter_NamesItsUnitOrThatItHasNone() => Assert.Empty(PublicMethods
        .SelectMany(m => m.GetParameters().Where(p => IsDouble(p.ParameterType) && !Names(p.Name!, m)).Select(p => $"{m.DeclaringType!.Name}.{m.Name}({p.Name})")));

    // Spectrum.FromSamples checks count and finiteness; tables are made by the file reader alone.
    [Fact]
    public void NoPublicMember_TakesUncheckedSamples() => Assert.Equal(
        ["Spectrum.FromSamples(samples)"],
        PublicMethods
            .SelectMany(m => m.GetParameters().Where(p => IsSamples(p.ParameterType)).Select(p => $"{m.DeclaringType!.Name}.{m.Name}({p.Name})"))
            .ToArray());

    [Fact]
    public void TypesThatHoldSamples_HaveNoPublicConstructor() => Assert.All(
        new[] { typeof(Spectrum<WattPerNm>), typeof(StandardObserver), typeof(SpectrumTable) }, t => Assert.Empty(t.GetConstructors()));

    [Fact]
    public void FromSamples_WithAWrongCountOrNoNumber_NamesIt()
    {
        ArgumentException count = Assert.Throws<ArgumentException>(() => Spectrum.FromSamples<WattPerNm>(new double[401], "led.csv"));
        Assert.StartsWith("led.csv: 401 samples; the grid has 471.", count.Message, StringComparison.Ordinal);
        foreach (double bad in new[] { double.NaN, double.PositiveInfinity, double.NegativeInfinity })
        {
            var samples = new double[WavelengthGrid.Count];
            samples[90] = bad;
            ArgumentException value = Assert.Throws<ArgumentException>(() => Spectrum.FromSamples<WattPerNm>(samples, "led.csv"));
            Assert.Contains("at 450 nm.", value.Message, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void FromSamples_Afterwards_DoesNotFollowTheArray()
    {
        var samples = new double[WavelengthGrid.Count];
        Spectrum<WattPerNm> light = Spectrum.FromSamples<WattPerNm>(samples, "test");
        samples[0] = 7;
        Assert.Equal(0, light[360]);
    }

    private static bool Names(string parameter, MethodBase method) =>
        Coordinates.Contains(parameter, StringComparer.OrdinalIgnoreCase)
        || Units.Any(u => parameter.EndsWith(u, StringComparison.Ordinal) || string.Equals(parameter, u, StringComparison.OrdinalIgnoreCase))
        || (parameter == "value" && method.IsGenericMethodDefinition && method.GetGenericArguments()[0].Name == "TUnit");

    private static bool IsDouble(Type type) => (Nullable.GetUnderlyingType(type) ?? type) == typeof(double);

    private static bool IsSamples(Type type) => type == typeof(double[])
        || type == typeof(ReadOnlySpan<double>) || type == typeof(Span<double>)
        || type == typeof(ReadOnlyMemory<double>) || type == typeof(Memory<double>)
        || typeof(IEnumerable<double>).IsAssignableFrom(type);
}
