//! The Rosenbrock methods: one place to add another.
//!
//! A step of size h from y solves, for i = 1..s with W = I/(h gamma) - J,
//!
//! ```text
//! W U_i = f(y + sum_j a_ij U_j) + sum_j (c_ij / h) U_j
//! y_new = y + sum_j a_sj U_j + U_s,   error estimate = U_s
//! ```
//!
//! which is the usual form that avoids products with J (Hairer & Wanner 1996,
//! Solving Ordinary Differential Equations II, section IV.7). The methods here
//! are stiffly accurate, so that the last stages reuse the argument of the one
//! before: `y + sum_j a_ij U_j` of stage i is that of stage i - 1 plus U_(i-1).

/// Largest number of stages.
pub(super) const MOST_STAGES: usize = 8;

type Triangle = [[f64; MOST_STAGES]; MOST_STAGES];

/// A stiffly accurate Rosenbrock method with an embedded error estimate and
/// its own interpolant.
#[derive(Debug, PartialEq)]
pub struct Method {
    /// Name as published.
    pub name: &'static str,
    /// Order of the embedded (lower) solution plus one: the step size follows
    /// the error to the power -1/order.
    pub order: i32,
    /// Stages.
    pub stages: usize,
    /// From this stage on (counting from 0) the argument is the previous one
    /// plus the previous U.
    pub accumulates_from: usize,
    /// Diagonal coefficient.
    pub gamma: f64,
    /// Weights of earlier stages in the argument of f.
    pub a: Triangle,
    /// Weights of earlier stages, over h, in the right-hand side.
    pub c: Triangle,
    /// Interpolant: y(t + x h) = (1 - x) y + x (y_new + (1 - x)(k1 + x (k2 + x k3)))
    /// with k_m = sum_j dense\[m\]\[j\] U_j.
    pub dense: [[f64; MOST_STAGES]; 3],
}

const fn rows<const R: usize, const N: usize>(list: [[f64; N]; R]) -> [[f64; MOST_STAGES]; R] {
    let mut out = [[0.0; MOST_STAGES]; R];
    let mut i = 0;
    while i < R {
        let mut j = 0;
        while j < N {
            out[i][j] = list[i][j];
            j += 1;
        }
        i += 1;
    }
    out
}

impl Method {
    /// RODAS 5(4), eight stages.
    ///
    /// # Source
    /// G. Di Marzo 1993, RODAS5(4): methodes de Rosenbrock d'ordre 5(4) adaptees
    /// aux problemes differentiels-algebriques, MSc thesis, University of
    /// Geneva. Coefficients from memory; the order is verified by the tests.
    #[must_use]
    pub fn rodas5() -> &'static Self {
        &RODAS5
    }

    /// RODAS 4(3), six stages.
    ///
    /// # Source
    /// Hairer & Wanner 1996, Solving Ordinary Differential Equations II, 2nd
    /// edition, section VI.4. Coefficients from memory; the order is verified
    /// by the tests.
    #[must_use]
    pub fn rodas4() -> &'static Self {
        &RODAS4
    }

    /// All methods.
    #[must_use]
    pub fn all() -> [&'static Self; 2] {
        [&RODAS5, &RODAS4]
    }
}

static RODAS5: Method = Method {
    name: "RODAS 5(4)",
    order: 5,
    stages: 8,
    accumulates_from: 6,
    gamma: 0.19,
    a: rows([
        [0.0, 0.0, 0.0, 0.0, 0.0],
        [2.0, 0.0, 0.0, 0.0, 0.0],
        [3.040894194418781, 1.041747909077569, 0.0, 0.0, 0.0],
        [2.576417536461461, 1.622083060776640, -0.9089668560264532, 0.0, 0.0],
        [2.760842080225597, 1.446624659844071, -0.3036980084553738, 0.2877498600325443, 0.0],
        [
            -14.09640773051259,
            6.925207756232704,
            -41.47510893210728,
            2.343771018586405,
            24.13215229196062,
        ],
        [0.0; 5],
        [0.0; 5],
    ]),
    c: rows([
        [0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0],
        [-10.31323885133993, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0],
        [-21.04823117650003, -7.234992135176716, 0.0, 0.0, 0.0, 0.0, 0.0],
        [32.22751541853323, -4.943732386540191, 19.44922031041879, 0.0, 0.0, 0.0, 0.0],
        [
            -20.69865579590063,
            -8.816374604402768,
            1.260436877740897,
            -0.7495647613787146,
            0.0,
            0.0,
            0.0,
        ],
        [
            -46.22004352711257,
            -17.49534862857472,
            -289.6389582892057,
            93.60855400400906,
            318.3822534212147,
            0.0,
            0.0,
        ],
        [
            34.20013733472935,
            -14.15535402717690,
            57.82335640988400,
            25.83362985412365,
            1.408950972071624,
            -6.551835421242162,
            0.0,
        ],
        [
            42.57076742291101,
            -13.80770672017997,
            93.98938432427124,
            18.77919633714503,
            -31.58359187223370,
            -6.685968952921985,
            -5.810979938412932,
        ],
    ]),
    dense: rows([
        [
            27.354592673333357,
            -6.925207756232857,
            26.40037733258859,
            0.5635230501052979,
            -4.699151156849391,
            -1.6008677469422725,
            -1.5306074446748028,
            -1.3929872940716344,
        ],
        [
            44.19024239501722,
            1.3677947663381929e-13,
            202.93261852171622,
            -35.5669339789154,
            -181.91095152160645,
            3.4116351403665033,
            2.5793540257308067,
            2.2435122582734066,
        ],
        [
            -44.0988150021747,
            -5.755396159656812e-13,
            -181.26175034586677,
            56.99302194811676,
            183.21182741427398,
            -7.480257918273637,
            -5.792426076169686,
            -5.32503859794143,
        ],
    ]),
};

static RODAS4: Method = Method {
    name: "RODAS 4(3)",
    order: 4,
    stages: 6,
    accumulates_from: 5,
    gamma: 0.25,
    a: rows([
        [0.0, 0.0, 0.0, 0.0],
        [1.544, 0.0, 0.0, 0.0],
        [0.9466785280815826, 0.2557011698983284, 0.0, 0.0],
        [3.314825187068521, 2.896124015972201, 0.9986419139977817, 0.0],
        [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.6878860361058950],
        [0.0; 4],
        [0.0; 4],
        [0.0; 4],
    ]),
    c: rows([
        [0.0, 0.0, 0.0, 0.0, 0.0],
        [-5.6688, 0.0, 0.0, 0.0, 0.0],
        [-2.430093356833875, -0.2063599157091915, 0.0, 0.0, 0.0],
        [-0.1073529058151375, -9.594562251023355, -20.47028614809616, 0.0, 0.0],
        [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.70890893206160, 0.0],
        [
            8.083246795921522,
            -7.981132988064893,
            -31.52159432874371,
            16.31930543123136,
            -6.058818238834054,
        ],
        [0.0; 5],
        [0.0; 5],
    ]),
    dense: rows([
        [
            10.12623508344586,
            -7.487995877610167,
            -34.80091861555747,
            -7.992771707568823,
            1.025137723295662,
        ],
        [
            -0.6762803392801253,
            6.087714651680015,
            16.43084320892478,
            24.76722511418386,
            -6.594389125716872,
        ],
        [0.0; 5],
    ]),
};
