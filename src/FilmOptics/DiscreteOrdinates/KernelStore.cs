using System.Collections.Concurrent;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>What a model keeps from one solve to the next: shapes with their tables, and scratch. Safe for several threads.</summary>
internal sealed class KernelStore(bool withAngles, double largestTailShare)
{
    // A search over loadings needs one shape; a page whose user moves a slider back and forth needs a few.
    private const int Kept = 4;

    private readonly ConcurrentBag<FilmSolver> _solvers = [];
    private StoredShape[] _shapes = [];

    /// <summary>The shape of a film, known or new.</summary>
    public StoredShape ShapeOf(Film film, IReadOnlyList<MergedLayer> layers)
    {
        foreach (var known in Volatile.Read(ref _shapes))
        {
            if (known.Shape.Is(film, layers))
                return known;
        }

        // Two threads may both add: then one table is made twice, and that is all.
        var shape = new StoredShape(new FilmShape(film, layers), withAngles, largestTailShare);
        Volatile.Write(ref _shapes, [shape, .. Volatile.Read(ref _shapes).Take(Kept - 1)]);
        return shape;
    }

    /// <summary>Scratch that fits a film.</summary>
    public FilmSolver TakeSolver(Film film, IReadOnlyList<MergedLayer> layers) =>
        _solvers.TryTake(out var solver) && solver.Lights.Serve(film, layers) ? solver : new FilmSolver(new FilmLights(film, layers), layers.Count);

    /// <summary>Gives scratch back.</summary>
    public void GiveBack(FilmSolver solver) => _solvers.Add(solver);
}
