using System.Globalization;

namespace Colorimetry;

/// <summary>Faults of one file as they are found. A file that is wrong throughout gives the first few and the number of the others.</summary>
/// <param name="file">Names the file.</param>
internal sealed class FaultList(string file)
{
    private const int MostShown = 10;

    private readonly List<InputFault> _shown = [];
    private int _count;

    /// <summary>Names the file.</summary>
    public string File => file;

    /// <summary>Whether any was found.</summary>
    public bool Any => _count > 0;

    /// <summary>Adds one.</summary>
    public void Add(int? line, int? column, string message)
    {
        if (_count++ < MostShown)
            _shown.Add(new(file, line, column, message));
    }

    /// <summary>All that was found, in one exception.</summary>
    public InputException ToException()
    {
        if (_count > MostShown)
            _shown.Add(new(file, null, null, string.Create(CultureInfo.InvariantCulture, $"{_count - MostShown} more faults follow in this file.")));
        return new(_shown);
    }
}
