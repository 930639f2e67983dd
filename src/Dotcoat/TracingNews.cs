using System.Globalization;
using FilmOptics;

namespace Dotcoat;

/// <summary>How far a traced run has come, in words; empty before the first news.</summary>
internal sealed class TracingNews : IProgress<TracingProgress>
{
    private TracingProgress? _latest;

    public void Report(TracingProgress value) => Volatile.Write(ref _latest, value);

    public override string ToString() => Volatile.Read(ref _latest) is { } latest
        ? string.Create(
            CultureInfo.InvariantCulture,
            $"{100.0 * latest.PhotonsDone / latest.PhotonsAsked:0} % of {latest.PhotonsAsked:#,0} photons, standard error {100 * latest.StandardErrorShare:0.000} % so far; Ctrl-C keeps what is traced")
        : "";
}
