using OdeDsl;

namespace Tarnwater;

/// <summary>
/// An aerated flow-through basin of the waste-water works: bacteria live on the dissolved feed, ciliates live on the bacteria.
/// </summary>
/// <remarks>
/// <para>
/// Growth after J. Monod (The growth of bacterial cultures, Annual Review of Microbiology 3, 1949), washed out by the flow as in
/// J. Monod (La technique de culture continue, 1950) and A. Novick and L. Szilard (1950): without ciliates the bacteria hold their own
/// up to the dilution rate µ·S<sub>in</sub> / (K + S<sub>in</sub>).
/// </para>
/// <para>
/// With falling dilution the basin goes from washout to bacteria alone, to bacteria and ciliates side by side, to both rising and falling in
/// turn. Oxygen is taken as plentiful; nothing is returned from a settler.
/// </para>
/// </remarks>
[OdeModel(TimeUnit = "d")]
public sealed partial class SludgeBasin
{
    /// <summary>Dissolved feed, as chemical oxygen demand.</summary>
    [State(Initial = 60, Lower = 0, Upper = 300, Unit = "g/m3")]
    public partial double Feed { get; set; }

    /// <summary>Bacteria, as chemical oxygen demand.</summary>
    [State(Initial = 40, Lower = 0, Upper = 140, Unit = "g/m3")]
    public partial double Bacteria { get; set; }

    /// <summary>Ciliates, as chemical oxygen demand.</summary>
    [State(Initial = 20, Lower = 0, Upper = 50, Unit = "g/m3")]
    public partial double Ciliates { get; set; }

    /// <summary>Flow through the basin over its volume.</summary>
    [Parameter(1.5, Lower = 0.4, Upper = 6, Unit = "1/d")]
    public partial double Dilution { get; set; }

    /// <summary>Feed in the inflow.</summary>
    [Parameter(250, Lower = 20, Upper = 500, Unit = "g/m3")]
    public partial double InflowFeed { get; set; }

    /// <summary>Fastest growth of the bacteria.</summary>
    [Parameter(5.0, Lower = 1, Upper = 12, Unit = "1/d")]
    public partial double BacteriaGrowth { get; set; }

    /// <summary>Feed at which the bacteria grow half as fast.</summary>
    [Parameter(15, Lower = 2, Upper = 80, Unit = "g/m3")]
    public partial double BacteriaHalfFeed { get; set; }

    /// <summary>Bacteria made from a unit of feed.</summary>
    [Parameter(0.5, Lower = 0.2, Upper = 0.8, Unit = "1")]
    public partial double BacteriaYield { get; set; }

    /// <summary>Fastest growth of the ciliates.</summary>
    [Parameter(2.4, Lower = 0.5, Upper = 6, Unit = "1/d")]
    public partial double CiliateGrowth { get; set; }

    /// <summary>Bacteria at which the ciliates grow half as fast.</summary>
    [Parameter(20, Lower = 4, Upper = 80, Unit = "g/m3")]
    public partial double CiliateHalfFood { get; set; }

    /// <summary>Ciliates made from a unit of bacteria.</summary>
    [Parameter(0.5, Lower = 0.2, Upper = 0.8, Unit = "1")]
    public partial double CiliateYield { get; set; }

    private double Digestion => BacteriaGrowth * Feed / (BacteriaHalfFeed + Feed) * Bacteria;

    private double Uptake => CiliateGrowth * Bacteria / (CiliateHalfFood + Bacteria) * Ciliates;

    [Rate(nameof(Feed))]
    private double FeedRate => Dilution * (InflowFeed - Feed) - Digestion / BacteriaYield;

    [Rate(nameof(Bacteria))]
    private double BacteriaRate => Digestion - Uptake / CiliateYield - Dilution * Bacteria;

    [Rate(nameof(Ciliates))]
    private double CiliatesRate => Uptake - Dilution * Ciliates;
}
