using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// An order of elimination with little fill: always the variable with the fewest neighbours in the graph of the rest. The graph is kept as
/// variables and elements (cliques left behind by eliminated variables), degrees are bounded from above, and variables that an
/// elimination leaves with no other neighbours are eliminated with it (P. R. Amestoy, T. A. Davis, I. S. Duff, An approximate
/// minimum degree ordering algorithm, SIAM Journal on Matrix Analysis and Applications 17, 1996). Variables coupled to a large
/// part of all others come last.
/// </summary>
internal sealed class MinimumDegree
{
    private readonly int size;
    private readonly List<int>?[] variables; // neighbours that are variables; null: eliminated or dense
    private readonly List<int>[] elements; // neighbouring elements of a variable
    private readonly int[]?[] members; // the variables of an element; null: absorbed
    private readonly int[] degrees;
    private readonly int[] heads, next, previous; // variables by degree
    private readonly int[] marks;
    private readonly int[] outside, outsideMark; // variables of an element that are not in the pivot's, and when that was counted
    private readonly List<int> order;
    private int mark;
    private int smallest;

    private MinimumDegree(SparsityPattern pattern)
    {
        size = pattern.RowCount;
        variables = new List<int>?[size];
        elements = new List<int>[size];
        members = new int[]?[size];
        degrees = new int[size];
        (heads, next, previous) = (new int[size + 1], new int[size], new int[size]);
        (marks, outside, outsideMark) = (new int[size], new int[size], new int[size]);
        order = new List<int>(size);
        Array.Fill(heads, -1);
        Connect(pattern);
    }

    /// <summary>Finds the order for a matrix and its transpose: the k-th variable to be eliminated.</summary>
    public static int[] Order(SparsityPattern pattern) => new MinimumDegree(pattern).Run();

    private void Connect(SparsityPattern pattern)
    {
        for (int i = 0; i < size; i++) (variables[i], elements[i]) = ([], []);
        for (int i = 0; i < size; i++)
        {
            for (int entry = pattern.RowStarts[i]; entry < pattern.RowStarts[i + 1]; entry++)
            {
                int j = pattern.Columns[entry];
                if (i == j) continue;
                variables[i]!.Add(j);
                variables[j]!.Add(i);
            }
        }

        double denseDegree = Math.Max(16, 10 * Math.Sqrt(size));
        List<int> dense = [];
        for (int i = 0; i < size; i++)
        {
            List<int> unique = [.. variables[i]!.Distinct()];
            variables[i] = unique;
            if (unique.Count > denseDegree) dense.Add(i);
        }

        foreach (int i in dense) variables[i] = null;
        for (int i = 0; i < size; i++)
        {
            if (variables[i] is not { } mine) continue;
            if (dense.Count > 0) mine.RemoveAll(j => variables[j] is null);
            Enlist(i, mine.Count);
        }

        denseLast = dense;
    }

    private List<int> denseLast = [];

    private int[] Run()
    {
        while (order.Count + denseLast.Count < size)
        {
            while (heads[smallest] < 0) smallest++;
            Eliminate(heads[smallest]);
        }

        order.AddRange(denseLast);
        return [.. order];
    }

    private void Eliminate(int pivot)
    {
        Delist(pivot);
        order.Add(pivot);
        mark++;
        int pivotMark = mark;
        marks[pivot] = pivotMark;
        List<int> clique = [];
        Gather(variables[pivot]!, clique, pivotMark);
        foreach (int element in elements[pivot])
        {
            Gather(members[element]!, clique, pivotMark);
            members[element] = null;
        }

        variables[pivot] = null;
        CountOutside(clique, pivotMark);
        List<int> rest = [];
        foreach (int i in clique)
        {
            Delist(i);
            List<int> mine = variables[i]!;
            // Neighbours inside the clique are neighbours through it from now on.
            mine.RemoveAll(j => marks[j] == pivotMark || variables[j] is null);
            elements[i].RemoveAll(e => members[e] is null || outside[e] == 0);
            if (mine.Count == 0 && elements[i].Count == 0)
            {
                // Its only neighbours are the clique: eliminated at no further fill.
                order.Add(i);
                variables[i] = null;
            }
            else
            {
                rest.Add(i);
            }
        }

        members[pivot] = [.. rest];
        foreach (int i in rest)
        {
            int degree = variables[i]!.Count + rest.Count - 1;
            foreach (int element in elements[i]) degree += outside[element];
            elements[i].Add(pivot);
            Enlist(i, Math.Min(degree, size - order.Count - 1));
        }
    }

    private void Gather(IEnumerable<int> from, List<int> clique, int pivotMark)
    {
        foreach (int i in from)
        {
            if (variables[i] is null || marks[i] == pivotMark) continue;
            marks[i] = pivotMark;
            clique.Add(i);
        }
    }

    private void CountOutside(List<int> clique, int pivotMark)
    {
        foreach (int i in clique)
        {
            foreach (int element in elements[i])
            {
                if (members[element] is not { } all) continue;
                if (outsideMark[element] != pivotMark)
                {
                    outsideMark[element] = pivotMark;
                    // Members that mass elimination removed are few; counting them only loosens the bound.
                    outside[element] = all.Length;
                }

                outside[element]--;
            }
        }
    }

    private void Enlist(int variable, int degree)
    {
        degree = Math.Max(degree, 0);
        degrees[variable] = degree;
        next[variable] = heads[degree];
        previous[variable] = -1;
        if (heads[degree] >= 0) previous[heads[degree]] = variable;
        heads[degree] = variable;
        smallest = Math.Min(smallest, degree);
    }

    private void Delist(int variable)
    {
        if (previous[variable] >= 0) next[previous[variable]] = next[variable];
        else heads[degrees[variable]] = next[variable];
        if (next[variable] >= 0) previous[next[variable]] = previous[variable];
    }
}
