namespace FilmOptics;

/// <summary>Where white is judged.</summary>
public enum TargetPlace
{
    /// <summary>The light that leaves above the sheets.</summary>
    Film,

    /// <summary>The panel's white: the sum of its primaries.</summary>
    Panel,
}

/// <summary>What colours are computed from.</summary>
public enum TargetView
{
    /// <summary>The flux leaving into the hemisphere.</summary>
    Hemisphere,

    /// <summary>The radiance along the normal, as a spot meter reads it.</summary>
    Normal,
}

/// <summary>What a designer asks of white, and what may be moved for it.</summary>
/// <param name="Place">Film or panel.</param>
/// <param name="View">Hemisphere or normal.</param>
/// <param name="WhiteX">CIE x of the target.</param>
/// <param name="WhiteY">CIE y of the target.</param>
/// <param name="ToleranceXy">Largest distance in xy that counts as on target, above 0.</param>
/// <param name="Free">Lots whose loadings may move.</param>
/// <param name="Gamuts">Names of the standards to compare with.</param>
public sealed record WhiteTarget(
    TargetPlace Place,
    TargetView View,
    double WhiteX,
    double WhiteY,
    double ToleranceXy,
    IReadOnlyList<FreeLoading> Free,
    IReadOnlyList<string> Gamuts);

/// <summary>A lot whose loadings (in all layers, by one factor) may move.</summary>
/// <param name="LotName">The lot.</param>
/// <param name="MinMgPerMl">Lower bound on the lot's largest loading of any layer, mg/mL.</param>
/// <param name="MaxMgPerMl">Upper bound, mg/mL.</param>
public sealed record FreeLoading(string LotName, double MinMgPerMl = 0, double MaxMgPerMl = 500);
