namespace FilmOptics.Reading;

/// <summary>What later sections of a film file refer to: the host, the lots by name and where they are used.</summary>
internal sealed class FilmParts(FaultList faults)
{
    private readonly Dictionary<string, DotLot> _lots = [];

    public double HostRefractiveIndex { get; set; } = double.NaN;

    public double? HostDensityGPerMl { get; set; }

    /// <summary>Names of all lots of the file, faulty ones too.</summary>
    public List<string> LotNames { get; } = [];

    /// <summary>Names of lots that a layer holds, in the order of <see cref="LotNames"/>.</summary>
    public List<string> UsedLotNames { get; } = [];

    /// <summary>Whether a layer names a lot that the file lacks; what no layer holds is then not certain.</summary>
    public bool HasUnknownLot { get; private set; }

    public void Add(DotLot lot) => _lots[lot.Name] = lot;

    /// <summary>The lot; null where it has a fault of its own.</summary>
    public DotLot? Lot(string name) => _lots.GetValueOrDefault(name);

    /// <summary>False, with a fault, where the file has no such lot.</summary>
    public bool RequireLot(string name, Node at, string fullKey)
    {
        if (LotNames.Contains(name))
            return true;
        HasUnknownLot = true;
        string nearest = Shown.Nearest(name, LotNames) is { } known ? $"the nearest is {Shown.Quoted(known)}" : "lots is empty";
        faults.Add(at.Place, $"{fullKey} is {Shown.Quoted(name)}; lots has no such name, {nearest}.");
        return false;
    }
}
