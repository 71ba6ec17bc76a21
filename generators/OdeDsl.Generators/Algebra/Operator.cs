namespace OdeDsl.Generators.Algebra;

/// <summary>
/// The operations of an <see cref="ExpressionGraph"/>. Operands are named First, Second, Third in the order of the C# operation;
/// all numbers are doubles and every operation rounds as C# does, so an expression built in the user's order evaluates to the
/// user's bits.
/// </summary>
internal enum Operator : byte
{
    // Leaves. Payload: the bits of the constant, or the index.
    Constant,
    State,
    Parameter,
    Time,

    // The numbers behind the parameters. Payload: their place in the same vector.
    Mode,
    Input,

    /// <summary>The derivative of an input by time, only in derivatives.</summary>
    InputSlope,

    /// <summary>A direction component, only in Jacobian-vector products. Payload: index.</summary>
    Direction,

    // Arithmetic.
    Add,
    Subtract,
    Multiply,
    Divide,
    Remainder,
    Negate,

    // Functions of System.Math with the same name.
    Sqrt,
    Cbrt,
    Exp,
    Log,
    LogBase,
    Log2,
    Log10,
    Pow,
    Sin,
    Cos,
    Tan,
    Asin,
    Acos,
    Atan,
    Atan2,
    Sinh,
    Cosh,
    Tanh,
    Asinh,
    Acosh,
    Atanh,
    FusedMultiplyAdd,
    CopySign,
    IEEERemainder,

    // Functions with kinks or jumps: each owns a switching function.
    Abs,
    Sign,
    Min,
    Max,
    MinMagnitude,
    MaxMagnitude,
    Clamp,
    Floor,
    Ceiling,
    Truncate,
    Round,
    RoundAwayFromZero,

    // Conditions (bool). BooleanConstant: payload 0 or 1.
    BooleanConstant,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,
    Equal,
    NotEqual,
    And,
    Or,
    Not,

    /// <summary>First ? Second : Third, for numbers and for conditions.</summary>
    Conditional,

    // Only in locked graphs. Payload: index of the switching function.

    /// <summary>The condition "regime entry is 1".</summary>
    Side,

    /// <summary>The regime entry of a whole-number switch, as a number.</summary>
    WholeNumber,

    // Tables, see TableNodes. Payload: index of the table.

    /// <summary>The value at First, as the user wrote it.</summary>
    TableValue,

    /// <summary>The number of the segment that holds First.</summary>
    TableSegment,

    /// <summary>The polynomial of segment Second at First, or a derivative of it (its order is in the payload too).</summary>
    TablePolynomial,

    /// <summary>The position of First among the knots, on the scale of segment Second.</summary>
    TablePosition,

    /// <summary>The derivative of that position.</summary>
    TablePositionSlope,

    // Only in models with vectors (tables: VectorPart).

    /// <summary>An element of a vector-valued state, parameter or direction. Payload: access.</summary>
    StateElement,
    ParameterElement,
    DirectionElement,

    /// <summary>A whole number as a double. Payload: number.</summary>
    IndexNumber,

    /// <summary>What a loop has added up before a pass. Payload: fold and index.</summary>
    Accumulator,

    /// <summary>A loop: starts with First, and each pass makes Second of what there is. Payload: fold and index.</summary>
    Fold,

    /// <summary>The sum of First over an index, only in derivatives. Payload: index.</summary>
    Sum,
}
