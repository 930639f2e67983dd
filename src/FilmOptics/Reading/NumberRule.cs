namespace FilmOptics.Reading;

/// <summary>Which numbers a key allows.</summary>
/// <param name="Low">Lower limit.</param>
/// <param name="High">Upper limit.</param>
/// <param name="Words">The same in words, for messages.</param>
/// <param name="IsLowOpen">The lower limit itself is not allowed.</param>
/// <param name="IsHighOpen">The upper limit itself is not allowed.</param>
internal sealed record NumberRule(double Low, double High, string Words, bool IsLowOpen = false, bool IsHighOpen = false)
{
    public static readonly NumberRule Any = new(double.MinValue, double.MaxValue, "any number");
    public static readonly NumberRule Share = new(0, 1, "0 to 1");
    public static readonly NumberRule AtLeastZero = new(0, double.MaxValue, "at least 0");
    public static readonly NumberRule AboveZero = new(0, double.MaxValue, "above 0", IsLowOpen: true);
    public static readonly NumberRule AtLeastOne = new(1, double.MaxValue, "at least 1");
    public static readonly NumberRule RefractiveIndex = new(1, 3, "1 to 3");
    public static readonly NumberRule ParticleIndex = new(0.1, 10, "0.1 to 10");
    public static readonly NumberRule ParticleRadiusUm = new(0.001, 50, "0.001 to 50 µm");
    public static readonly NumberRule SizeSpread = new(1, 3, "1 to 3");
    public static readonly NumberRule Anisotropy = new(-1, 1, "above -1, below 1", IsLowOpen: true, IsHighOpen: true);
    public static readonly NumberRule ThicknessUm = new(0, 10_000, "above 0, to 10 000 µm", IsLowOpen: true);
    public static readonly NumberRule WtPercent = new(0, 100, "at least 0, below 100 %", IsHighOpen: true);
    public static readonly NumberRule StockWtPercent = new(0, 100, "above 0, to 100 %", IsLowOpen: true);
    public static readonly NumberRule DensityGPerMl = new(0, 25, "above 0, to 25 g/mL", IsLowOpen: true);
    public static readonly NumberRule DotDiameterNm = new(1, 20, "1 to 20 nm");
    public static readonly NumberRule ShellNm = new(0, 20, "above 0, to 20 nm", IsLowOpen: true);
    public static readonly NumberRule SpreadPercent = new(0, 30, "0 to 30 %");
    public static readonly NumberRule FwhmMev = new(10, 500, "10 to 500 meV");
    public static readonly NumberRule StokesNm = new(-20, 150, "-20 to 150 nm");
    public static readonly NumberRule ShareAboveZero = new(0, 1, "above 0, to 1", IsLowOpen: true);
    public static readonly NumberRule ShapePeakNm = new(360, 830, "360 to 830 nm");
    public static readonly NumberRule ShiftNm = new(-200, 200, "-200 to 200 nm");

    public bool Allows(double value) =>
        (IsLowOpen ? value > Low : value >= Low) && (IsHighOpen ? value < High : value <= High);
}
