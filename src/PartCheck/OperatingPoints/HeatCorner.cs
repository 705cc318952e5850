namespace PartCheck.OperatingPoints;

/// <summary>One way in which a channel's junctions may be heated.</summary>
/// <param name="Heat">1: self-heated; 0: just switched on.</param>
/// <param name="Coupling">Share of the hottest leg's RthJA that heats the control, where it is assumed; null: given.</param>
/// <param name="PackageCoupling">Share of RthJA that passes between elements of a package, where it is assumed; null: given, or nothing to pass.</param>
/// <param name="NeighboursOn">Whether elements in other channels are on; null: there are none.</param>
internal readonly record struct HeatCorner(int Heat, double? Coupling, double? PackageCoupling, bool? NeighboursOn)
{
    /// <summary>The ways of a channel; with the pin low nothing heats itself.</summary>
    public static IEnumerable<HeatCorner> Of(ChannelModel model, bool off)
    {
        ReadOnlySpan<int> heats = !model.Heats || off ? [0] : [0, 1];
        List<HeatCorner> corners = [];
        foreach (int heat in heats)
        {
            double?[] couplings = heat == 0 || model.CouplingGiven ? [null] : [0, ChannelModel.AssumedCouplingShare];
            bool?[] neighbours = model.Heats && model.Package.HasNeighbours ? [false, true] : [null];
            foreach (double? coupling in couplings)
            {
                foreach (bool? on in neighbours)
                {
                    bool passes = model.Package.Shares && (heat == 1 || on == true);
                    double?[] packages = passes && !model.Package.Given ? [0, 1] : [null];
                    corners.AddRange(packages.Select(package => new HeatCorner(heat, coupling, package, on)));
                }
            }
        }

        return corners;
    }
}
