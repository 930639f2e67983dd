namespace FilmOptics.DiscreteOrdinates;

/// <summary>Sets of optical properties to solve the film for; each column is one state.</summary>
internal sealed class OpticalStates(int layers, int count)
{
    public int Count => count;

    /// <summary>Absorption of each layer with its dots, 1/mm, at [layer][state].</summary>
    public double[][] Absorption { get; } = Columns(layers, count);

    /// <summary>Scattering of each layer, 1/mm, at [layer][state].</summary>
    public double[][] Scattering { get; } = Columns(layers, count);

    /// <summary>Anisotropy of each layer, at [layer][state].</summary>
    public double[][] Anisotropy { get; } = Columns(layers, count);

    public double[] BelowReflectance { get; } = new double[count];

    public double[] AboveReflectance { get; } = new double[count];

    public double[] AboveAbsorptance { get; } = new double[count];

    private static double[][] Columns(int layers, int count) => [.. Enumerable.Range(0, layers).Select(_ => new double[count])];
}
