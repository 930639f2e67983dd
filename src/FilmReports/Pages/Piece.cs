using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>A strip of a page that is not divided.</summary>
/// <param name="Before">Room above it, points; none at the top of a page.</param>
/// <param name="Height">Its height, points.</param>
/// <param name="Draw">Its marks with its top at a height of the page.</param>
/// <param name="KeepsNext">Whether the next piece belongs on the same page.</param>
/// <param name="Repeated">What stands above it again where it begins a page: the head of its table.</param>
internal sealed record Piece(double Before, double Height, Func<double, IEnumerable<Mark>> Draw, bool KeepsNext = false, Piece? Repeated = null);
