namespace OdeDsl.LinearAlgebra;

/// <summary>
/// <see cref="RealFactorization"/> for a complex matrix, real and imaginary parts kept apart. The pivot is the entry with the largest
/// |real| + |imaginary|. Allocates nothing after construction. Not thread-safe.
/// </summary>
internal sealed class ComplexFactorization
{
    private readonly int stride;
    private readonly double[] real, imaginary;
    private readonly double[] reciprocalReal, reciprocalImaginary;
    private readonly double[] workReal, workImaginary;
    private readonly int[] pivotRows;

    /// <param name="size">The number of rows and columns.</param>
    public ComplexFactorization(int size)
    {
        Size = size;
        stride = ColumnSums.Stride(size);
        (real, imaginary) = (new double[size * stride], new double[size * stride]);
        (reciprocalReal, reciprocalImaginary) = (new double[size], new double[size]);
        (workReal, workImaginary) = (new double[stride], new double[stride]);
        pivotRows = new int[size];
    }

    /// <summary>The number of rows and columns.</summary>
    public int Size { get; }

    /// <summary>Sets an entry of the matrix to be factored; all must be set before each <see cref="Factor"/>.</summary>
    public void Set(int row, int column, double realPart, double imaginaryPart)
    {
        int at = column * stride + ColumnSums.Room + row;
        real[at] = realPart;
        imaginary[at] = imaginaryPart;
    }

    /// <summary>Factors the matrix in place.</summary>
    /// <returns><see langword="false"/> if a pivot is zero or not finite: the factors are then of no use.</returns>
    public bool Factor()
    {
        int n = Size;
        for (int k = 0; k < n; k++)
        {
            int start = k * stride + ColumnSums.Room;
            Span<double> re = real.AsSpan(start, n), im = imaginary.AsSpan(start, n);
            int pivot = k;
            double largest = Math.Abs(re[k]) + Math.Abs(im[k]);
            for (int i = k + 1; i < n; i++)
            {
                double size = Math.Abs(re[i]) + Math.Abs(im[i]);
                if (size > largest) (pivot, largest) = (i, size);
            }

            pivotRows[k] = pivot;
            // Also false for a pivot that is not a number.
            if (!(largest > 0 && largest <= double.MaxValue)) return false;
            if (pivot != k) SwapRows(k, pivot);
            (double c, double s) = Reciprocal(re[k], im[k]);
            (reciprocalReal[k], reciprocalImaginary[k]) = (c, s);
            for (int i = k + 1; i < n; i++) (re[i], im[i]) = (re[i] * c - im[i] * s, re[i] * s + im[i] * c);
            Eliminate(k, k * stride);
        }

        return true;
    }

    /// <summary>Solves A x = b with the factors.</summary>
    /// <param name="realPart">The real part of b, replaced by that of x.</param>
    /// <param name="imaginaryPart">The imaginary part of b, replaced by that of x.</param>
    public void Solve(Span<double> realPart, Span<double> imaginaryPart)
    {
        int n = Size;
        Span<double> re = workReal.AsSpan(ColumnSums.Room, n), im = workImaginary.AsSpan(ColumnSums.Room, n);
        realPart[..n].CopyTo(re);
        imaginaryPart[..n].CopyTo(im);
        for (int k = 0; k < n; k++)
        {
            int pivot = pivotRows[k];
            if (pivot == k) continue;
            (re[pivot], re[k]) = (re[k], re[pivot]);
            (im[pivot], im[k]) = (im[k], im[pivot]);
        }

        for (int k = 0; k < n - 1; k++)
        {
            int column = k * stride;
            ColumnSums.SubtractBelow(workReal, 0, re[k], real, column, k + 1, n);
            ColumnSums.SubtractBelow(workReal, 0, -im[k], imaginary, column, k + 1, n);
            ColumnSums.SubtractBelow(workImaginary, 0, re[k], imaginary, column, k + 1, n);
            ColumnSums.SubtractBelow(workImaginary, 0, im[k], real, column, k + 1, n);
        }

        for (int k = n - 1; k >= 0; k--)
        {
            double c = reciprocalReal[k], s = reciprocalImaginary[k];
            (re[k], im[k]) = (re[k] * c - im[k] * s, re[k] * s + im[k] * c);
            int column = k * stride;
            ColumnSums.SubtractAbove(workReal, re[k], real, column, k);
            ColumnSums.SubtractAbove(workReal, -im[k], imaginary, column, k);
            ColumnSums.SubtractAbove(workImaginary, re[k], imaginary, column, k);
            ColumnSums.SubtractAbove(workImaginary, im[k], real, column, k);
        }

        re.CopyTo(realPart);
        im.CopyTo(imaginaryPart);
    }

    // Subtracts multiples of column k from the columns to its right.
    private void Eliminate(int k, int source)
    {
        int n = Size;
        for (int j = k + 1; j < n; j++)
        {
            int target = j * stride, at = target + ColumnSums.Room + k;
            double re = real[at], im = imaginary[at];
            if (re == 0 && im == 0) continue;
            ColumnSums.SubtractBelow(real, target, re, real, source, k + 1, n);
            ColumnSums.SubtractBelow(real, target, -im, imaginary, source, k + 1, n);
            ColumnSums.SubtractBelow(imaginary, target, re, imaginary, source, k + 1, n);
            ColumnSums.SubtractBelow(imaginary, target, im, real, source, k + 1, n);
        }
    }

    // R. L. Smith's division (Communications of the ACM 5, 1962): no overflow for representable results.
    private static (double Real, double Imaginary) Reciprocal(double re, double im)
    {
        if (Math.Abs(re) >= Math.Abs(im))
        {
            double ratio = im / re, scale = 1 / (re + im * ratio);
            return (scale, -ratio * scale);
        }
        else
        {
            double ratio = re / im, scale = 1 / (re * ratio + im);
            return (ratio * scale, -scale);
        }
    }

    private void SwapRows(int first, int second)
    {
        for (int at = ColumnSums.Room; at < real.Length; at += stride)
        {
            (real[at + first], real[at + second]) = (real[at + second], real[at + first]);
            (imaginary[at + first], imaginary[at + second]) = (imaginary[at + second], imaginary[at + first]);
        }
    }
}
