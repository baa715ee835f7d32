//! Spectroscopic constants.
//!
//! Atoms: levels of the NIST Atomic Spectra Database (Kramida, Ralchenko, Reader
//! and NIST ASD Team). Diatomics: Huber & Herzberg 1979, Constants of Diatomic
//! Molecules. Polyatomics: Herzberg 1966, Electronic Spectra of Polyatomic
//! Molecules, and, for ions, laboratory work as commonly quoted. Provenance of
//! all of it: memory; three or four digits are meant to be right. Low-lying
//! excited states of molecules are left out except those of C2 and O2.

use super::{Levels, Rotor};

/// Levels of the species that have data.
#[rustfmt::skip]
pub const MOLECULES: &[Levels] = &[
    Levels { name: "e-", electronic: &[(2.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "H", electronic: &[(2.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "H+", electronic: &[(1.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "H-", electronic: &[(1.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "He", electronic: &[(1.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "He+", electronic: &[(2.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "C", electronic: &[(1.0, 0.0), (3.0, 16.42), (5.0, 43.41), (5.0, 10192.6)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "C+", electronic: &[(2.0, 0.0), (4.0, 63.42)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "N", electronic: &[(4.0, 0.0), (10.0, 19228.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "N+", electronic: &[(1.0, 0.0), (3.0, 48.7), (5.0, 130.8), (5.0, 15316.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "O", electronic: &[(5.0, 0.0), (3.0, 158.265), (1.0, 226.977), (5.0, 15867.9)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "O+", electronic: &[(4.0, 0.0), (10.0, 26820.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "O-", electronic: &[(4.0, 0.0), (2.0, 177.1)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "S", electronic: &[(5.0, 0.0), (3.0, 396.06), (1.0, 573.64), (5.0, 9238.6)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "S+", electronic: &[(4.0, 0.0), (10.0, 14870.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Si", electronic: &[(1.0, 0.0), (3.0, 77.12), (5.0, 223.16), (5.0, 6298.9)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Si+", electronic: &[(2.0, 0.0), (4.0, 287.24)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Na", electronic: &[(2.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Na+", electronic: &[(1.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Mg", electronic: &[(1.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Mg+", electronic: &[(2.0, 0.0)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Fe", electronic: &[(9.0, 0.0), (7.0, 415.93), (5.0, 704.01), (3.0, 888.13), (1.0, 978.07), (11.0, 6928.3), (9.0, 7376.8), (7.0, 7728.1), (5.0, 7985.8), (3.0, 8154.7)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "Fe+", electronic: &[(10.0, 0.0), (8.0, 384.79), (6.0, 667.68), (4.0, 862.61), (2.0, 977.05), (10.0, 1872.6), (8.0, 2430.1), (6.0, 2838.0), (4.0, 3117.5)], rotor: Rotor::None, vibrations: &[] },
    Levels { name: "H2", electronic: &[(1.0, 0.0)], rotor: Rotor::Hydrogen { b: 59.34 }, vibrations: &[(4161.2, 1.0)] },
    Levels { name: "H2+", electronic: &[(2.0, 0.0)], rotor: Rotor::Hydrogen { b: 29.12 }, vibrations: &[(2191.1, 1.0)] },
    Levels { name: "H3+", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [43.57, 43.57, 20.61], symmetry: 6.0 }, vibrations: &[(3178.0, 1.0), (2521.4, 2.0)] },
    Levels { name: "HeH+", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 33.53, symmetry: 1.0 }, vibrations: &[(2911.0, 1.0)] },
    Levels { name: "OH", electronic: &[(1.0, 0.0)], rotor: Rotor::Pi { b: 18.535, a: -139.21, symmetry: 1.0 }, vibrations: &[(3569.6, 1.0)] },
    Levels { name: "OH+", electronic: &[(3.0, 0.0)], rotor: Rotor::Linear { b: 16.423, symmetry: 1.0 }, vibrations: &[(2956.4, 1.0)] },
    Levels { name: "OH-", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 18.74, symmetry: 1.0 }, vibrations: &[(3555.6, 1.0)] },
    Levels { name: "H2O", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [27.877, 14.512, 9.285], symmetry: 2.0 }, vibrations: &[(3657.1, 1.0), (1594.7, 1.0), (3755.9, 1.0)] },
    Levels { name: "H2O+", electronic: &[(2.0, 0.0)], rotor: Rotor::Bent { constants: [29.04, 12.42, 8.47], symmetry: 2.0 }, vibrations: &[(3213.0, 1.0), (1408.4, 1.0), (3259.0, 1.0)] },
    Levels { name: "H3O+", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [11.15, 11.15, 6.1], symmetry: 3.0 }, vibrations: &[(3445.0, 1.0), (954.0, 1.0), (3535.6, 2.0), (1638.5, 2.0)] },
    Levels { name: "O2", electronic: &[(3.0, 0.0), (2.0, 7882.4)], rotor: Rotor::Linear { b: 1.4377, symmetry: 2.0 }, vibrations: &[(1556.4, 1.0)] },
    Levels { name: "O2+", electronic: &[(1.0, 0.0)], rotor: Rotor::Pi { b: 1.6825, a: 200.3, symmetry: 2.0 }, vibrations: &[(1872.6, 1.0)] },
    Levels { name: "HO2", electronic: &[(2.0, 0.0)], rotor: Rotor::Bent { constants: [20.356, 1.118, 1.056], symmetry: 1.0 }, vibrations: &[(3436.2, 1.0), (1391.8, 1.0), (1097.6, 1.0)] },
    Levels { name: "CH", electronic: &[(1.0, 0.0)], rotor: Rotor::Pi { b: 14.192, a: 28.15, symmetry: 1.0 }, vibrations: &[(2732.5, 1.0)] },
    Levels { name: "CH+", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 13.931, symmetry: 1.0 }, vibrations: &[(2739.7, 1.0)] },
    Levels { name: "CH2", electronic: &[(3.0, 0.0)], rotor: Rotor::Bent { constants: [73.81, 8.45, 7.18], symmetry: 2.0 }, vibrations: &[(2806.0, 1.0), (963.1, 1.0), (3190.0, 1.0)] },
    Levels { name: "CH3", electronic: &[(2.0, 0.0)], rotor: Rotor::Bent { constants: [9.578, 9.578, 4.742], symmetry: 6.0 }, vibrations: &[(3004.4, 1.0), (606.5, 1.0), (3160.8, 2.0), (1396.0, 2.0)] },
    Levels { name: "CH4", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [5.241, 5.241, 5.241], symmetry: 12.0 }, vibrations: &[(2916.5, 1.0), (1533.3, 2.0), (3019.5, 3.0), (1310.8, 3.0)] },
    Levels { name: "C2", electronic: &[(1.0, 0.0), (6.0, 716.2)], rotor: Rotor::Linear { b: 1.8111, symmetry: 2.0 }, vibrations: &[(1827.5, 1.0)] },
    Levels { name: "C2H2", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.1766, symmetry: 2.0 }, vibrations: &[(3372.9, 1.0), (1974.3, 1.0), (3288.7, 1.0), (612.9, 2.0), (730.3, 2.0)] },
    Levels { name: "CO", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.9225, symmetry: 1.0 }, vibrations: &[(2143.3, 1.0)] },
    Levels { name: "CO+", electronic: &[(2.0, 0.0)], rotor: Rotor::Linear { b: 1.9677, symmetry: 1.0 }, vibrations: &[(2183.9, 1.0)] },
    Levels { name: "CO2", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 0.3902, symmetry: 2.0 }, vibrations: &[(1333.0, 1.0), (667.4, 2.0), (2349.1, 1.0)] },
    Levels { name: "HCO", electronic: &[(2.0, 0.0)], rotor: Rotor::Bent { constants: [24.33, 1.494, 1.399], symmetry: 1.0 }, vibrations: &[(2434.5, 1.0), (1080.8, 1.0), (1868.2, 1.0)] },
    Levels { name: "HCO+", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.4875, symmetry: 1.0 }, vibrations: &[(3088.7, 1.0), (828.2, 2.0), (2183.9, 1.0)] },
    Levels { name: "H2CO", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [9.405, 1.295, 1.134], symmetry: 2.0 }, vibrations: &[(2782.5, 1.0), (1746.1, 1.0), (1500.1, 1.0), (1167.3, 1.0), (2843.2, 1.0), (1249.1, 1.0)] },
    Levels { name: "N2", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.9896, symmetry: 2.0 }, vibrations: &[(2329.9, 1.0)] },
    Levels { name: "N2+", electronic: &[(2.0, 0.0)], rotor: Rotor::Linear { b: 1.9222, symmetry: 2.0 }, vibrations: &[(2174.7, 1.0)] },
    Levels { name: "NH", electronic: &[(3.0, 0.0)], rotor: Rotor::Linear { b: 16.343, symmetry: 1.0 }, vibrations: &[(3125.6, 1.0)] },
    Levels { name: "NH2", electronic: &[(2.0, 0.0)], rotor: Rotor::Bent { constants: [23.69, 12.95, 8.17], symmetry: 2.0 }, vibrations: &[(3219.4, 1.0), (1497.3, 1.0), (3301.1, 1.0)] },
    Levels { name: "NH3", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [9.944, 9.944, 6.196], symmetry: 3.0 }, vibrations: &[(3336.7, 1.0), (950.4, 1.0), (3443.8, 2.0), (1626.8, 2.0)] },
    Levels { name: "NO", electronic: &[(1.0, 0.0)], rotor: Rotor::Pi { b: 1.6961, a: 123.1, symmetry: 1.0 }, vibrations: &[(1876.1, 1.0)] },
    Levels { name: "NO+", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.9878, symmetry: 1.0 }, vibrations: &[(2344.0, 1.0)] },
    Levels { name: "HNO", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [18.48, 1.411, 1.307], symmetry: 1.0 }, vibrations: &[(2684.0, 1.0), (1565.3, 1.0), (1500.8, 1.0)] },
    Levels { name: "CN", electronic: &[(2.0, 0.0)], rotor: Rotor::Linear { b: 1.891, symmetry: 1.0 }, vibrations: &[(2042.4, 1.0)] },
    Levels { name: "HCN", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.4782, symmetry: 1.0 }, vibrations: &[(2096.8, 1.0), (713.5, 2.0), (3311.5, 1.0)] },
    Levels { name: "HNC", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 1.5121, symmetry: 1.0 }, vibrations: &[(2023.9, 1.0), (462.7, 2.0), (3652.7, 1.0)] },
    Levels { name: "HS", electronic: &[(1.0, 0.0)], rotor: Rotor::Pi { b: 9.461, a: -376.9, symmetry: 1.0 }, vibrations: &[(2598.8, 1.0)] },
    Levels { name: "H2S", electronic: &[(1.0, 0.0)], rotor: Rotor::Bent { constants: [10.36, 9.016, 4.731], symmetry: 2.0 }, vibrations: &[(2614.4, 1.0), (1182.6, 1.0), (2628.5, 1.0)] },
    Levels { name: "SO", electronic: &[(3.0, 0.0)], rotor: Rotor::Linear { b: 0.7179, symmetry: 1.0 }, vibrations: &[(1138.0, 1.0)] },
    Levels { name: "CS", electronic: &[(1.0, 0.0)], rotor: Rotor::Linear { b: 0.8171, symmetry: 1.0 }, vibrations: &[(1272.2, 1.0)] },
];
