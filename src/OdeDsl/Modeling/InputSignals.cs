namespace OdeDsl.Modeling;

/// <summary>The signals bound to a system's inputs, with the pieces a run is locked to.</summary>
/// <param name="signals">For each input its signal, or <see langword="null"/> where the input is constant.</param>
/// <param name="first">Where the inputs' values stand in the vector of constants; their slopes follow.</param>
internal sealed class InputSignals(Signal?[] signals, int first)
{
    private readonly int[] pieces = new int[signals.Length];

    /// <summary>Whether any signal can jump at a kink.</summary>
    public bool CanJump { get; } = Array.Exists(signals, static signal => signal is { IsContinuous: false, Kinks.Length: > 0 });

    /// <summary>Whether any input has a signal.</summary>
    public bool Any => Array.Exists(signals, static signal => signal is not null);

    /// <summary>A copy whose pieces are its own.</summary>
    public InputSignals Copy() => new(signals, first);

    /// <summary>The same with one signal replaced.</summary>
    public InputSignals With(int index, Signal? signal)
    {
        Signal?[] changed = [.. signals];
        changed[index] = signal;
        return new InputSignals(changed, first);
    }

    /// <summary>Locks all signals to the pieces that lead away from a time.</summary>
    /// <param name="time">The time.</param>
    /// <param name="direction">1: later times; -1: earlier ones.</param>
    /// <returns>The next kink in that direction; infinite if there is none.</returns>
    public double Lock(double time, int direction)
    {
        double next = direction * double.PositiveInfinity;
        for (int i = 0; i < signals.Length; i++)
        {
            if (signals[i] is not { } signal) continue;
            pieces[i] = direction > 0 ? signal.PieceAfter(time) : signal.PieceBefore(time);
            int kink = direction > 0 ? pieces[i] : pieces[i] - 1;
            if (kink >= 0 && kink < signal.Kinks.Length && (signal.Kinks[kink] - next) * direction < 0) next = signal.Kinks[kink];
        }

        return next;
    }

    /// <summary>Writes the values and slopes at a time, and after it where a signal jumps: whatever pieces are locked.</summary>
    public void RefreshAfter(double time, double[] constants)
    {
        for (int i = 0; i < signals.Length; i++)
        {
            if (signals[i] is not { } signal) continue;
            int piece = signal.PieceAfter(time);
            constants[first + i] = signal.At(time, piece);
            constants[first + signals.Length + i] = signal.SlopeAt(time, piece);
        }
    }

    /// <summary>Writes the values at a time of the locked pieces.</summary>
    public void Refresh(double time, double[] constants)
    {
        for (int i = 0; i < signals.Length; i++)
        {
            if (signals[i] is { } signal) constants[first + i] = signal.At(time, pieces[i]);
        }
    }

    /// <summary>Writes the values and the slopes at a time of the locked pieces.</summary>
    public void RefreshWithSlopes(double time, double[] constants)
    {
        Refresh(time, constants);
        for (int i = 0; i < signals.Length; i++)
        {
            if (signals[i] is { } signal) constants[first + signals.Length + i] = signal.SlopeAt(time, pieces[i]);
        }
    }
}
