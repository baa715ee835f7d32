//! Line shielding of H2, CO and N2 from starlight.
//!
//! Each function is 1 at zero columns, never above 1, never rises with a
//! column, and beyond its table keeps the value at the edge.

/// Self-shielding of H2:
/// 0.965/(1 + x/b5)^2 + 0.035/sqrt(1 + x) exp(-8.5e-4 sqrt(1 + x)),
/// x = N(H2)/5e14 cm^-2, b5 = b in km/s.
///
/// # Range
/// Columns up to about 3e22 cm^-2.
///
/// # Source
/// Draine & Bertoldi 1996, ApJ 468, 269, eq. 37. Provenance: memory.
pub fn h2(h2_column: f64, doppler_width: f64) -> f64 {
    let x = h2_column / 5e14;
    let root = (1.0 + x).sqrt();
    let core = 1.0 + x / doppler_width;
    let factor = 0.965 / (core * core) + 0.035 / root * libm::exp(-8.5e-4 * root);
    // 0.035 exp(-8.5e-4) + 0.965 is 3e-5 short of 1 at x = 0.
    if h2_column > 0.0 { factor.min(1.0) } else { 1.0 }
}

/// log10 of N(CO)/cm^-2 at the columns of [`CO_TABLE`].
const CO_AXIS: [f64; 7] = [13.0, 14.0, 15.0, 16.0, 17.0, 18.0, 19.0];

/// log10 of N(H2)/cm^-2 at the rows of [`CO_TABLE`], after the row for none.
const H2_AXIS: [f64; 5] = [19.0, 20.0, 21.0, 22.0, 23.0];

/// Shielding of 12CO for b(CO) 0.3 km/s, T_ex(CO) 5 K, 12CO/13CO 69.
/// First row: no H2; first column: no CO.
///
/// Visser, van Dishoeck & Black 2009, Astron. Astrophys. 503, 323, table 5.
/// Provenance: memory; single digits may be off, trends are right.
const CO_TABLE: [[f64; 8]; 6] = [
    [1.0, 9.681e-1, 7.764e-1, 3.631e-1, 7.013e-2, 1.295e-2, 1.738e-3, 9.985e-5],
    [8.215e-1, 7.916e-1, 6.160e-1, 2.749e-1, 5.351e-2, 1.065e-2, 1.519e-3, 8.818e-5],
    [7.160e-1, 6.900e-1, 5.360e-1, 2.359e-1, 4.416e-2, 8.769e-3, 1.254e-3, 7.558e-5],
    [3.500e-1, 3.415e-1, 2.863e-1, 1.360e-1, 2.500e-2, 4.983e-3, 7.151e-4, 3.796e-5],
    [4.973e-2, 4.877e-2, 4.296e-2, 2.110e-2, 4.958e-3, 9.245e-4, 1.745e-4, 8.377e-6],
    [1.310e-4, 1.293e-4, 1.160e-4, 6.346e-5, 1.822e-5, 6.842e-6, 3.622e-6, 3.572e-7],
];

/// Shielding of CO by its own lines and those of H2.
///
/// # Units
/// Columns to the surface, cm^-2.
///
/// # Range
/// The table ends at N(CO) 1e19 and N(H2) 1e23 cm^-2. Between nodes ln(factor)
/// is linear in log column; below the first node, in the column itself.
///
/// # Source
/// As `CO_TABLE`: Visser et al. 2009, Astron. Astrophys. 503, 323.
pub fn co(co_column: f64, h2_column: f64) -> f64 {
    let (column, right) = locate(&CO_AXIS, co_column);
    let (row, below) = locate(&H2_AXIS, h2_column);
    let ln = |r: usize, c: usize| libm::log(CO_TABLE[r][c]);
    let across = |r: usize| ln(r, column) * (1.0 - right) + ln(r, column + 1) * right;
    libm::exp(across(row) * (1.0 - below) + across(row + 1) * below)
}

/// Self-shielding of N2 at the columns 1e13, 1e14 ... 1e19 cm^-2, after none.
///
/// Rounded values of our own, drawn through the trend of Li et al. 2013, Astron.
/// Astrophys. 555, A14 and Heays et al. 2014, Astron. Astrophys. 562, A61 (lines
/// thick from about 1e14 cm^-2). Provenance: memory of the trend only; take them
/// as good to a factor 2 above 0.1 and to a factor 4 below.
const N2_SELF: [f64; 8] = [1.0, 0.93, 0.60, 0.18, 4.0e-2, 1.0e-2, 2.5e-3, 5.0e-4];

/// Shielding of N2 by the lines of H2 at 1e19 ... 1e23 cm^-2, after none.
/// Source and provenance as [`N2_SELF`].
const N2_BY_H2: [f64; 6] = [1.0, 0.90, 0.75, 0.40, 5.0e-2, 1.0e-4];

/// Shielding of N2 by its own lines and those of H2: a product of two functions,
/// rough (see the source).
///
/// # Units
/// Columns to the surface, cm^-2.
///
/// # Source
/// As `N2_SELF`.
pub fn n2(n2_column: f64, h2_column: f64) -> f64 {
    let pick = |table: &[f64], axis: &[f64], value: f64| {
        let (at, share) = locate(axis, value);
        libm::log(table[at]) * (1.0 - share) + libm::log(table[at + 1]) * share
    };
    libm::exp(pick(&N2_SELF, &CO_AXIS, n2_column) + pick(&N2_BY_H2, &H2_AXIS, h2_column))
}

/// Cell of a column on an axis of log10 columns that is preceded by "none":
/// the index of the left node (0 is none) and the share of the right one.
fn locate(axis: &[f64], column: f64) -> (usize, f64) {
    let last = axis.len() - 1;
    // A column that is not a number shields nothing; conditions are checked first.
    if column.is_nan() || column <= 0.0 {
        return (0, 0.0);
    }
    let log = libm::log10(column);
    if log <= axis[0] {
        return (0, (column / libm::pow(10.0, axis[0])).min(1.0));
    }
    if log >= axis[last] {
        return (last, 1.0);
    }
    let left = axis.iter().rposition(|node| *node <= log).unwrap_or(0);
    (left + 1, (log - axis[left]) / (axis[left + 1] - axis[left]))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A shielding function of one column and its name.
    type Named = (&'static str, fn(f64) -> f64);

    fn columns() -> impl Iterator<Item = f64> {
        std::iter::once(0.0).chain((0..560).map(|i| 10f64.powf(f64::from(i) * 0.05)))
    }

    #[test]
    fn shielding_is_one_without_a_column_and_never_rises() {
        let functions: [Named; 6] = [
            ("H2", |n| h2(n, 1.0)),
            ("H2, broad lines", |n| h2(n, 10.0)),
            ("CO by CO", |n| co(n, 0.0)),
            ("CO by H2", |n| co(0.0, n)),
            ("N2 by N2", |n| n2(n, 0.0)),
            ("N2 by H2", |n| n2(0.0, n)),
        ];
        for (name, function) in functions {
            assert!((function(0.0) - 1.0).abs() < 1e-15, "{name}");
            let mut before = 1.0;
            for column in columns() {
                let now = function(column);
                assert!((0.0..=before).contains(&now), "{name} at {column:e}: {now:e}");
                before = now;
            }
        }
    }

    #[test]
    fn shielding_meets_published_values() {
        // H2: Draine & Bertoldi 1996 eq. 37 by hand; x = 1e4 at b = 1 km/s gives
        // 0.965e-8 + 0.035/100.005 exp(-0.0850). CO: Visser et al. 2009 table 5.
        let cases = [
            ("H2 at 5e18", h2(5e18, 1.0), 3.2145e-4, 1e-4),
            ("CO at a node", co(1e16, 1e21), 2.500e-2, 1e-10),
            ("CO between nodes", co(10f64.powf(16.5), 0.0), 3.0136e-2, 1e-4),
            ("CO beyond the table", co(1e25, 1e28), 3.572e-7, 1e-10),
        ];
        for (case, got, expected, tolerance) in cases {
            assert!((got / expected - 1.0).abs() < tolerance, "{case}: {got:e}");
        }
    }
}
