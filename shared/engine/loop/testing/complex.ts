/** Complex numbers in double precision, for checking against. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export function complex(re: number, im = 0): Complex {
  return { re, im };
}

export function add(a: Complex, b: Complex): Complex {
  return complex(a.re + b.re, a.im + b.im);
}

export function multiply(a: Complex, b: Complex): Complex {
  return complex(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);
}

export function divide(a: Complex, b: Complex): Complex {
  const size = b.re * b.re + b.im * b.im;
  return complex((a.re * b.re + a.im * b.im) / size, (a.im * b.re - a.re * b.im) / size);
}

export function modulus(a: Complex): number {
  return Math.sqrt(a.re * a.re + a.im * a.im);
}

/** Σ coefficients[k] s^k. */
export function polynomialAt(coefficients: readonly number[], s: Complex): Complex {
  return coefficients.reduceRight((sum, value) => add(multiply(sum, s), complex(value)), complex(0));
}

/** x of A x = b by Gauss elimination with pivoting. */
export function solveComplex(a: readonly (readonly Complex[])[], b: readonly Complex[]): Complex[] {
  const rows = a.map((row, i) => [...row, b[i]]);
  const n = rows.length;
  for (let column = 0; column < n; column++) {
    let pivot = column;
    for (let i = column + 1; i < n; i++)
      if (modulus(rows[i][column]) > modulus(rows[pivot][column])) pivot = i;
    [rows[column], rows[pivot]] = [rows[pivot], rows[column]];
    for (let i = 0; i < n; i++) {
      if (i === column) continue;
      const factor = divide(rows[i][column], rows[column][column]);
      rows[i] = rows[i].map((value, j) =>
        add(value, multiply(complex(-1), multiply(factor, rows[column][j]))),
      );
    }
  }
  return rows.map((row, i) => divide(row[n], row[i]));
}
