using OdeDsl.Modeling;

namespace OdeDsl.Tests.Problems;

/// <summary>A public test problem: a system, the time to run to, and the state there.</summary>
/// <param name="Name">Its name.</param>
/// <param name="System">The system.</param>
/// <param name="Until">The end time; all start at 0.</param>
/// <param name="AbsolutePart">The absolute tolerance to use, in parts of the relative one.</param>
/// <param name="Floor">Errors count relative to the larger of the reference and this.</param>
/// <param name="Reference">
/// The state at the end, from two unrelated integrators in 113-bit arithmetic (collocation at seven Radau points, order 13, whose values these are;
/// and extrapolation), which agree to 14 digits or more.
/// </param>
internal sealed record PublicProblem(
    string Name, DynamicSystem System, double Until, double AbsolutePart, double Floor, double[] Reference)
{
    /// <summary>The problems that are not stiff.</summary>
    public static IReadOnlyList<PublicProblem> Nonstiff { get; } =
    [
        new("Lorenz 63", DynamicSystem.Of(new Lorenz63()), 10, 1e-2, 1, [-5.91661812174324812, -5.52371776957541201, 2.45719649020096001e1]),
        new("Lotka-Volterra", DynamicSystem.Of(new LotkaVolterra()), 15, 0.1, 0, [7.13751378097759299e-1, 7.54077962407946931e-2]),
        new("Arenstorf orbit", DynamicSystem.Of(new Arenstorf()), 17.0652165601579625588917206249, 1, 1, 
            [
                9.94e-1, 1.69610199144962996e-21, 2.77578153608942238e-19, -2.00158510637908252
            ]),
        new("Pleiades", DynamicSystem.Of(new Pleiades()), 3, 1, 1, 
            [
                3.7061391439705129e-1, 3.23728409205723309, -3.22255903241832335, 6.59709145577530836e-1,
                3.42558170715657979e-1, 1.56217210140063102, -7.00309292221249539e-1, -3.94343758551739206,
                -3.27138097397254993, 5.22508184345654419, -2.59061243497746951, 1.19821369339227464,
                -2.42968234493582341e-1, 1.09144924042897975, 3.41700380631431475, 1.35458450162550122, -2.59006559781077542,
                2.02505373471424111, -1.15581510016044909, -8.07298817022302173e-1, 5.95239635420871877e-1,
                -3.74124496123400847, 3.77345968575062904e-1, 9.38685886955107889e-1, 3.66792222720056987e-1,
                -3.47404635380849437e-1, 2.34491544818093692, -1.9470204342632919
            ]),
        new("van der Pol 1", DynamicSystem.Of(new VanDerPol()), 20, 1, 1, [2.00814976217494859, -4.2508875273202147e-2]),
    ];

    /// <summary>The stiff problems.</summary>
    public static IReadOnlyList<PublicProblem> Stiff { get; } =
    [
        new("Robertson to 1e5", DynamicSystem.Of(new Robertson()), 1e5, 1e-7, 0, [1.7865921142099465e-2, 7.27475146843631877e-8, 9.82134006110385851e-1]),
        new("Robertson to 1e11", DynamicSystem.Of(new Robertson()), 1e11, 1e-13, 0, [2.08334014970129423e-8, 8.3333607703347834e-14, 9.99999979166515169e-1]),
        new("van der Pol 1000", DynamicSystem.Of(new VanDerPol { Mu = 1000 }), 2000, 1e-3, 0, [1.70616773217046501, -8.92809701024816549e-4]),
        new("HIRES", DynamicSystem.Of(new Hires()), 321.8122, 1e-4, 0, 
            [
                7.37131257332566781e-4, 1.44248572631618466e-4, 5.88872974096757501e-5, 1.17565134328314915e-3,
                2.38635619883133047e-3, 6.23896825274279578e-3, 2.84999839518576867e-3, 2.85000160481423133e-3
            ]),
        new("OREGO", DynamicSystem.Of(new Orego()), 360, 1e-2, 0, [1.00081487031852272, 1.22817852154988798e3, 1.32055494284650829e2]),
        new("POLLUTION", DynamicSystem.Of(new Pollution()), 60, 1e-8, 0, 
            [
                5.64625548002276927e-2, 1.34248413042233852e-1, 4.13973433109942697e-9, 5.52314020748435997e-3,
                2.01897726230219607e-7, 1.46454186349396581e-7, 7.78424911899796415e-2, 3.24507535339601822e-1,
                7.49401338388040555e-3, 1.62229315730156037e-8, 1.13586383325707483e-8, 2.23050597572135986e-3,
                2.08716288279863004e-4, 1.39692101684015782e-5, 8.96488485689829418e-3, 4.3528463693301037e-18,
                6.8992196962634054e-3, 1.00780303736594595e-4, 1.77214651396998454e-6, 5.68294329231639344e-5
            ]),
        new("E5", DynamicSystem.Of(new E5()), 1e9, 1e-20, 0, 
            [
                3.13171483293569973e-14, 1.48409579528700648e-16, 1.48409579483456919e-16, 4.52437282797826225e-26
            ]),
    ];

    /// <summary>The digits of a state that are correct: −log₁₀ of the largest error over the components.</summary>
    public double CorrectDigits(ReadOnlySpan<double> state)
    {
        double largest = 0;
        for (int i = 0; i < Reference.Length; i++)
            largest = Math.Max(largest, Math.Abs(state[i] - Reference[i]) / Math.Max(Math.Abs(Reference[i]), Floor));
        return -Math.Log10(largest);
    }

    /// <inheritdoc/>
    public override string ToString() => Name;
}
