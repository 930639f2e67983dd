namespace FilmOptics.Reading;

/// <summary>Reads `panel`.</summary>
internal static class PanelSection
{
    public static Panel? Read(Section section, SpectrumLoader loader)
    {
        var value = section.Required("filters");
        var filters = value is null ? null : loader.Filters(value, section.PathOf("filters"));
        double[]? shares = section.Find("area_shares") is { } areas ? AreaShares(section, areas) : [1.0 / 3, 1.0 / 3, 1.0 / 3];
        section.Close();
        return filters is not { } f || shares is null ? null : new(f.Red, f.Green, f.Blue, shares[0], shares[1], shares[2]);
    }

    private static double[]? AreaShares(Section section, Node value)
    {
        string key = section.PathOf("area_shares");
        if (value is not ListNode { Items.Count: 3 } list)
        {
            string found = value is ListNode other ? $"a list of {other.Items.Count}" : value.Described;
            section.Faults.Add(value.Place, $"{key} is {found}; a list of three is due: red, green, blue.");
            return null;
        }

        double[] shares = [.. list.Items.Select((item, i) => section.NumberOf(item, $"area_shares[{i}]", NumberRule.Share))];
        double sum = shares.Sum();
        if (sum <= 1 + 1e-9)
        {
            if (shares.All(share => share > 0))
                return shares;
            section.Faults.Add(value.Place, $"{key} has a share of 0; each has to be above 0.");
            return null;
        }

        if (!double.IsNaN(sum))
            section.Faults.Add(value.Place, $"{key} sum to {Shown.Number(sum)}; at most 1 is allowed.");
        return null;
    }
}
