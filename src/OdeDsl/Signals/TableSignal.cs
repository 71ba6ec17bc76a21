namespace OdeDsl;

/// <summary>A signal read from a table: piece p is the table's segment p − 1.</summary>
internal sealed class TableSignal(Table course) : Signal(course.Knots.ToArray())
{
    internal override bool IsContinuous => true;

    internal override double At(double time, int piece)
    {
        double value = course.At(time, piece - 1);
        return double.IsNaN(value) ? course.At(time) : value;
    }

    internal override double SlopeAt(double time, int piece) => course.Derivative(1, time, piece - 1);
}
