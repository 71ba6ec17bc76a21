using System;
using System.Collections.Generic;

namespace OdeDsl.Generators.Algebra;

/// <summary>
/// One operation of an <see cref="ExpressionGraph"/>. Operands are indices of earlier nodes, -1 where there is none. Constants
/// are kept as bits, so that 0.0 and -0.0 differ and every NaN equals itself.
/// </summary>
internal readonly record struct Node(Operator Operator, int First, int Second, int Third, long Payload)
{
    public double Constant => BitConverter.Int64BitsToDouble(Payload);

    public int Index => (int)Payload;

    /// <summary>The index of a loop; see <see cref="FoldPayload"/>.</summary>
    public int Symbol => (int)(Payload >> 32);

    public static long FoldPayload(int symbol, int fold) => ((long)symbol << 32) | (uint)fold;

    public bool IsLeaf => First < 0;

    /// <summary>The operands, in order.</summary>
    public IEnumerable<int> Operands
    {
        get
        {
            if (First >= 0) yield return First;
            if (Second >= 0) yield return Second;
            if (Third >= 0) yield return Third;
        }
    }
}
