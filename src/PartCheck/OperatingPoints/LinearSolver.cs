namespace PartCheck.OperatingPoints;

/// <summary>Dense linear equations, Gaussian elimination with scaled partial pivoting, in place.</summary>
internal static class LinearSolver
{
    /// <summary>Solves A x = b; both are overwritten, b by the solution.</summary>
    /// <param name="a">Matrix, row by row, n x n.</param>
    /// <param name="b">Right-hand side, then the solution.</param>
    /// <param name="n">Order.</param>
    /// <returns>False where the matrix is singular or not finite.</returns>
    public static bool Solve(double[] a, double[] b, int n)
    {
        for (int i = 0; i < n; i++)
        {
            double largest = 0;
            for (int j = 0; j < n; j++)
            {
                largest = Math.Max(largest, Math.Abs(a[(i * n) + j]));
            }

            if (!(largest > 0) || !double.IsFinite(largest))
            {
                return false;
            }

            double inverse = 1 / largest;
            for (int j = 0; j < n; j++)
            {
                a[(i * n) + j] *= inverse;
            }

            b[i] *= inverse;
        }

        for (int k = 0; k < n; k++)
        {
            int pivot = k;
            double best = Math.Abs(a[(k * n) + k]);
            for (int i = k + 1; i < n; i++)
            {
                double candidate = Math.Abs(a[(i * n) + k]);
                if (candidate > best)
                {
                    best = candidate;
                    pivot = i;
                }
            }

            if (!(best > 0))
            {
                return false;
            }

            if (pivot != k)
            {
                for (int j = k; j < n; j++)
                {
                    (a[(k * n) + j], a[(pivot * n) + j]) = (a[(pivot * n) + j], a[(k * n) + j]);
                }

                (b[k], b[pivot]) = (b[pivot], b[k]);
            }

            double diagonal = 1 / a[(k * n) + k];
            for (int i = k + 1; i < n; i++)
            {
                double factor = a[(i * n) + k] * diagonal;
                if (factor == 0)
                {
                    continue;
                }

                for (int j = k + 1; j < n; j++)
                {
                    a[(i * n) + j] -= factor * a[(k * n) + j];
                }

                b[i] -= factor * b[k];
            }
        }

        for (int i = n - 1; i >= 0; i--)
        {
            double sum = b[i];
            for (int j = i + 1; j < n; j++)
            {
                sum -= a[(i * n) + j] * b[j];
            }

            b[i] = sum / a[(i * n) + i];
        }

        return true;
    }
}
