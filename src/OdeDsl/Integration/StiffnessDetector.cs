namespace OdeDsl.Integration;

/// <summary>
/// Tells when an explicit method's step is held down by stability rather than accuracy: the last two stages of Dormand and Prince's pair
/// are taken at the same time, so their difference gives a lower estimate of the dominant eigenvalue (Hairer and Wanner, Solving ODEs II,
/// section IV.2, equation 2.27, with the counts given there).
/// </summary>
internal struct StiffnessDetector
{
    /// <summary>The extent of the stability region along the negative real axis, less a little.</summary>
    private const double StabilityLimit = 3.25;

    /// <summary>This many observations at the limit, without <see cref="CountToClear"/> others in a row, mean stiffness.</summary>
    private const int CountToStiff = 15;
    private const int CountToClear = 6;

    /// <summary>While nothing points to stiffness, only every so many steps are looked at.</summary>
    private const int Interval = 8;

    private int atLimit;
    private int clear;

    /// <summary>Whether the motion is stiff.</summary>
    public readonly bool IsStiff => atLimit >= CountToStiff;

    /// <summary>Whether this step is to be observed.</summary>
    public readonly bool IsDue(long step) => atLimit > 0 || step % Interval == 0;

    /// <summary>Observes an accepted step.</summary>
    /// <param name="h">Its size.</param>
    /// <param name="ratesBefore">The rates at the last inner stage.</param>
    /// <param name="ratesAfter">The rates at the end of the step.</param>
    /// <param name="stateBefore">The state of the last inner stage.</param>
    /// <param name="stateAfter">The state at the end of the step.</param>
    public void Observe(double h, double[] ratesBefore, double[] ratesAfter, double[] stateBefore, double[] stateAfter)
    {
        double rates = 0, states = 0;
        for (int i = 0; i < ratesAfter.Length; i++)
        {
            double rate = ratesAfter[i] - ratesBefore[i], state = stateAfter[i] - stateBefore[i];
            rates += rate * rate;
            states += state * state;
        }

        if (h * h * rates > StabilityLimit * StabilityLimit * states)
        {
            clear = 0;
            atLimit++;
        }
        else if (++clear >= CountToClear)
        {
            atLimit = 0;
        }
    }
}
