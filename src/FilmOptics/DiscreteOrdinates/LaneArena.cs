using System.Collections.Concurrent;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>Scratch for a solve: grows to what the largest film needs and is then used again.</summary>
internal sealed class LaneArena<T>
    where T : struct, ILanes<T>
{
    // Pages stay below what the runtime treats as large, and arenas outlive the models that used them.
    private const int PageLanes = 1024;
    private static readonly ConcurrentBag<LaneArena<T>> Spare = [];

    private readonly List<T[]> _pages = [];
    private int _page;
    private int _used;

    /// <summary>A spare one, or a new one.</summary>
    public static LaneArena<T> Rent() => Spare.TryTake(out var spare) ? spare : new LaneArena<T>();

    /// <summary>Gives one back, empty.</summary>
    public static void Return(LaneArena<T> arena)
    {
        arena.Release((0, 0));
        Spare.Add(arena);
    }

    /// <summary>A matrix of which nothing is known.</summary>
    public LaneMatrix<T> Take(int rows, int columns)
    {
        int length = rows * columns;
        while (_page < _pages.Count && _pages[_page].Length - _used < length)
            (_page, _used) = (_page + 1, 0);
        if (_page == _pages.Count)
            _pages.Add(GC.AllocateUninitializedArray<T>(Math.Max(length, PageLanes)));
        var matrix = new LaneMatrix<T>(_pages[_page].AsSpan(_used, length), rows, columns, columns);
        _used += length;
        return matrix;
    }

    /// <summary>A matrix of zeros.</summary>
    public LaneMatrix<T> TakeCleared(int rows, int columns)
    {
        var matrix = Take(rows, columns);
        matrix.Clear();
        return matrix;
    }

    /// <summary>Where the scratch stands, to come back to.</summary>
    public (int Page, int Used) Mark() => (_page, _used);

    /// <summary>Gives back all that was taken since the mark.</summary>
    public void Release((int Page, int Used) mark) => (_page, _used) = mark;
}
