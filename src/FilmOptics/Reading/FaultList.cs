using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Faults found so far. Reading goes on after a fault, so that one run names them all.</summary>
internal sealed class FaultList(string file)
{
    private const int MostReported = 100;

    private readonly List<InputFault> _faults = [];
    private readonly HashSet<InputFault> _seen = [];

    public int Count => _faults.Count;

    public bool Any => _faults.Count > 0;

    public void Add(Place place, string message) => Add(new InputFault(place.File, place.Line, place.Column, message));

    /// <summary>Adds a fault once: a spectrum file named by several keys is faulty once.</summary>
    public void Add(InputFault fault)
    {
        if (_seen.Add(fault))
            _faults.Add(fault);
    }

    /// <summary>Throws when there is a fault: those of the film file first, each file's by line.</summary>
    public void ThrowIfAny()
    {
        if (_faults.Count == 0)
            return;
        var files = _faults.Select(fault => fault.File).Distinct(StringComparer.Ordinal).ToList();
        var ordered = _faults
            .OrderBy(fault => fault.File == file ? -1 : files.IndexOf(fault.File))
            .ThenBy(fault => fault.Line ?? 0).ThenBy(fault => fault.Column ?? 0).ToList();
        if (ordered.Count > MostReported)
        {
            int more = ordered.Count - MostReported;
            ordered.RemoveRange(MostReported, more);
            ordered.Add(new(file, null, null, $"{more} more faults are not listed; mend these first."));
        }

        throw new InputException(ordered);
    }
}
