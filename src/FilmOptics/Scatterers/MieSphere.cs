using System.Numerics;

namespace FilmOptics;

/// <summary>How a single sphere in a clear medium scatters a plane wave: Mie's exact series.</summary>
/// <remarks>
/// Source: G. Mie, Ann. Phys. 25 (1908) 377; series as in C. F. Bohren, D. R. Huffman, "Absorption and Scattering of Light by
/// Small Particles" (1983), chapter 4. Efficiencies are cross-sections per geometric cross-section.
/// </remarks>
public sealed record MieSphere
{
    private const double LargestSize = 1e5;

    private MieSphere()
    {
    }

    /// <summary>Extinction: scattering and absorption.</summary>
    public double ExtinctionEfficiencyFactor { get; private init; }

    /// <summary>Scattering.</summary>
    public double ScatteringEfficiencyFactor { get; private init; }

    /// <summary>Absorption; 0, but for rounding, for a clear sphere.</summary>
    public double AbsorptionEfficiencyFactor => ExtinctionEfficiencyFactor - ScatteringEfficiencyFactor;

    /// <summary>Backscatter: 4 |S(180°)|²/x².</summary>
    public double BackscatterEfficiencyFactor { get; private init; }

    /// <summary>Mean cosine of the scattering angle, −1 to 1: the g of a Henyey–Greenstein function of the same asymmetry.</summary>
    public double MeanCosine { get; private init; }

    /// <summary>A sphere of given index.</summary>
    /// <param name="sizeFactor">Size parameter x = 2π radius × medium index ÷ vacuum wavelength, above 0, to 100 000.</param>
    /// <param name="relativeIndex">
    /// Index of the sphere ÷ that of the medium. Its imaginary part absorbs; the sign of that is a convention that does not matter.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The size or the index is out of range.</exception>
    public static MieSphere Of(double sizeFactor, Complex relativeIndex)
    {
        if (!(relativeIndex.Real > 0) || !double.IsFinite(relativeIndex.Real) || !double.IsFinite(relativeIndex.Imaginary))
        {
            throw new ArgumentOutOfRangeException(
                nameof(relativeIndex), relativeIndex, "The relative refractive index is finite, its real part above 0.");
        }

        var index = new Complex(relativeIndex.Real, Math.Abs(relativeIndex.Imaginary));
        int orders = OrdersFor(sizeFactor);
        var inside = LogarithmicDerivatives(orders, sizeFactor * index);
        var inverse = Inverse(index);
        return Sum(sizeFactor, orders, (wave, n) => (wave.Coefficient(inside[n] * inverse), wave.Coefficient(inside[n] * index)));
    }

    /// <summary>A sphere that no field enters: the limit of an endless index.</summary>
    /// <param name="sizeFactor">Size parameter x, above 0, to 100 000.</param>
    public static MieSphere PerfectConductor(double sizeFactor) =>
        Sum(sizeFactor, OrdersFor(sizeFactor), (wave, _) => (wave.Coefficient(Complex.Zero), wave.CoefficientWithoutField()));

    /// <summary>Orders that carry all digits: Wiscombe, Appl. Opt. 19 (1980) 1505.</summary>
    private static int OrdersFor(double sizeFactor) => sizeFactor is > 0 and <= LargestSize
        ? (int)Math.Ceiling(sizeFactor + (4.05 * Math.Cbrt(sizeFactor)) + 2)
        : throw new ArgumentOutOfRangeException(
            nameof(sizeFactor), sizeFactor, $"The size parameter is above 0 and at most {LargestSize:g}.");

    private static MieSphere Sum(
        double sizeFactor, int orders, Func<RadialWave, int, (Complex Electric, Complex Magnetic)> coefficients)
    {
        var wave = new RadialWave(sizeFactor, orders);
        double extinction = 0, scattering = 0, asymmetry = 0;
        Complex back = 0, lastElectric = 0, lastMagnetic = 0;
        for (int n = 1; n <= orders; n++)
        {
            wave.Advance(n);
            (Complex electric, Complex magnetic) = coefficients(wave, n);
            double weight = (2 * n) + 1;
            extinction += weight * (electric.Real + magnetic.Real);
            scattering += weight * (SquareOf(electric) + SquareOf(magnetic));
            back += (n % 2 == 0 ? weight : -weight) * (electric - magnetic);
            asymmetry += (n - 1.0) * (n + 1) / n * (Dot(lastElectric, electric) + Dot(lastMagnetic, magnetic));
            asymmetry += weight / (n * (n + 1.0)) * Dot(electric, magnetic);
            (lastElectric, lastMagnetic) = (electric, magnetic);
        }

        double square = sizeFactor * sizeFactor;
        return new()
        {
            ExtinctionEfficiencyFactor = 2 / square * extinction,
            ScatteringEfficiencyFactor = 2 / square * scattering,
            BackscatterEfficiencyFactor = SquareOf(back) / square,
            MeanCosine = scattering > 0 ? 2 * asymmetry / scattering : 0,
        };
    }

    private static double SquareOf(Complex value) => Dot(value, value);

    private static double Dot(Complex left, Complex right) => (left.Real * right.Real) + (left.Imaginary * right.Imaginary);

    /// <summary>D(n) = ψ′/ψ by downward recurrence, which is stable; it has to start well above the argument.</summary>
    private static Complex[] LogarithmicDerivatives(int orders, Complex argument)
    {
        var derivatives = new Complex[orders + 1];
        Complex derivative = 0, inverse = Inverse(argument);
        for (int n = FirstOrderFor(orders, Complex.Abs(argument)); n > 0; n--)
        {
            if (n <= orders)
                derivatives[n] = derivative;
            Complex ratio = n * inverse;
            derivative = ratio - Inverse(derivative + ratio);
        }

        return derivatives;
    }

    private static double[] LogarithmicDerivatives(int orders, double argument)
    {
        var derivatives = new double[orders + 1];
        double derivative = 0;
        for (int n = FirstOrderFor(orders, argument); n > 0; n--)
        {
            if (n <= orders)
                derivatives[n] = derivative;
            double ratio = n / argument;
            derivative = ratio - (1 / (derivative + ratio));
        }

        return derivatives;
    }

    private static int FirstOrderFor(int orders, double argument) =>
        (int)(Math.Max(orders, argument) + 30 + (12 * Math.Cbrt(argument)));

    // Nothing here is so large or small that the guarded division of Complex, several times slower, is called for.
    private static Complex Inverse(Complex value) =>
        new(value.Real / SquareOf(value), -value.Imaginary / SquareOf(value));

    /// <summary>The Riccati–Bessel functions outside the sphere, order by order.</summary>
    private sealed class RadialWave
    {
        private readonly double _size;
        private readonly double[] _derivatives;
        private int _order;
        private double _regular, _regularBefore, _irregular, _irregularBefore;

        public RadialWave(double size, int orders)
        {
            (_size, _derivatives) = (size, LogarithmicDerivatives(orders, size));
            (_regular, _regularBefore) = (Math.Sin(size), Math.Cos(size));
            (_irregular, _irregularBefore) = (Math.Cos(size), -Math.Sin(size));
        }

        private Complex Outgoing => new(_regular, -_irregular);

        private Complex OutgoingBefore => new(_regularBefore, -_irregularBefore);

        public void Advance(int order)
        {
            _order = order;
            double step = ((2 * order) - 1) / _size;

            // Upward recurrence loses ψ above the size parameter; there the ratio of neighbours is known from D instead.
            double regular = order < _size
                ? (step * _regular) - _regularBefore
                : _regular / (_derivatives[order] + (order / _size));
            double irregular = (step * _irregular) - _irregularBefore;
            (_regularBefore, _regular) = (_regular, regular);
            (_irregularBefore, _irregular) = (_irregular, irregular);
        }

        /// <summary>a(n) for D/m, b(n) for m D.</summary>
        public Complex Coefficient(Complex inside)
        {
            Complex sum = inside + (_order / _size);

            // ψ(n−1) = ψ(n) (D + n/x) with the D outside: for small spheres this form cancels by hand what would cancel in digits.
            Complex incoming = _order < _size
                ? (sum * _regular) - _regularBefore
                : _regular * (inside - _derivatives[_order]);
            return incoming * Inverse((sum * Outgoing) - OutgoingBefore);
        }

        /// <summary>b(n) where no field enters.</summary>
        public Complex CoefficientWithoutField() => _regular / Outgoing;
    }
}
