//! Balances of interstellar chemistry that can be written down: small networks
//! against the formula, at the coefficients of the papers that use it.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

mod support;

use std::sync::Arc;

use duskwater::cloud::Model;
use duskwater::network::Network;
use support::{close, index};

/// Steady values by name, of the one state that the start leads to.
struct Steady {
    network: Arc<Network>,
    abundances: Vec<f64>,
    n_h: f64,
}

impl Steady {
    fn of(model: &Model) -> Self {
        let report = model.steady_states();
        assert!(report.failures.is_empty(), "{}", support::joined(&report.failures));
        let state = &report.states[0];
        assert!(state.imbalance <= 1e-8, "imbalance {:e}", state.imbalance);
        Self {
            network: Arc::clone(&model.network),
            abundances: state.abundances.clone(),
            n_h: model.run.conditions.hydrogen_density,
        }
    }

    /// Number density, cm-3.
    fn n(&self, name: &str) -> f64 {
        self.abundances[index(&self.network, name)] * self.n_h
    }
}

const TIMES: &str = "[times]\nuntil = 1e7\n";

/// H2+ from cosmic rays always becomes H3+, which CO and electrons destroy.
/// Coefficients: Theard & Huntress 1974; McCall et al. 1999 for CO (1.8e-9) and
/// 2004 for electrons, -1.3e-8 + 1.27e-6 T^-0.48, which is 1.649e-7 at 60 K.
fn h3p_network(recombination: f64) -> Arc<Network> {
    support::network(
        "H\nH2\nH2+\nH3+\nCO\nHCO+\nC+\ne-",
        &format!(
            "H2 -> H2+ + e-,cosmic_ray,1\n\
             H2+ + H2 -> H3+ + H,thermal,2.08e-9\n\
             H3+ + CO -> HCO+ + H2,thermal,1.8e-9\n\
             H3+ + e- -> H2 + H,thermal,{recombination:e}\n\
             HCO+ + e- -> CO + H,thermal,2.4e-7,-0.69\n\
             H + H -> H2,dust_h2,3e-17,0.5"
        ),
    )
}

/// McCall et al. 2004, Phys. Rev. A 70, 052716 (provenance: memory), cm3 s-1.
fn h3p_recombination(temperature_k: f64) -> f64 {
    -1.3e-8 + 1.27e-6 * temperature_k.powf(-0.48)
}

#[test]
fn h3p_is_what_cosmic_rays_make_over_what_co_and_electrons_take() {
    // n(H3+) = zeta n(H2) / (k_CO n(CO) + k_e n(e-)), McCall et al. 1999, ApJ
    // 522, 338. Exact in this network: the tolerance is that of the steady state.
    for (n_h, temperature, zeta) in
        [(200.0, 60.0, 3.5e-16), (2e4, 10.0, 3e-17), (1e6, 10.0, 1.3e-17), (1e3, 300.0, 1e-14)]
    {
        let recombination = h3p_recombination(temperature);
        let start = "H2 = 0.5\nCO = 5e-5\n\"C+\" = 1e-6\n";
        let run = support::run_text(n_h, temperature, zeta, start, TIMES);
        let state = Steady::of(&support::model(&h3p_network(recombination), &run));
        let loss = 1.8e-9 * state.n("CO") + recombination * state.n("e-");
        close(&format!("n_H {n_h:e}"), state.n("H3+"), zeta * state.n("H2") / loss, 1e-6);
    }
}

#[test]
fn h3p_in_dense_gas_has_one_density_whatever_the_density() {
    // McCall et al. 1999: zeta 3e-17, k 1.8e-9, CO/H2 1e-4 give 1.667e-4 cm-3
    // (provenance: memory) when electrons are neglected. They take up to 9 per
    // cent here, less the denser the gas.
    for n_h in [2e4, 2e5, 2e6] {
        let run = support::run_text(n_h, 30.0, 3e-17, "H2 = 0.5\nCO = 5e-5\n", TIMES);
        let network = h3p_network(h3p_recombination(30.0));
        let state = Steady::of(&support::model(&network, &run));
        close(&format!("n_H {n_h:e}"), state.n("H3+"), 1.667e-4, 0.1);
    }
}

#[test]
fn h3p_in_diffuse_gas_follows_from_the_ionization_rate() {
    // Indriolo & McCall 2012, ApJ 745, 91: zeta 3.5e-16, x_e 1.5e-4, n_H 200, T
    // 60 K give n(H3+)/n(H2) = 7.073e-8 (provenance: memory). Tolerance: the
    // digits, and the electrons that the molecular ions add to those of carbon.
    let start = "H2 = 0.5\n\"C+\" = 1.5e-4\n";
    let run = support::run_text(200.0, 60.0, 3.5e-16, start, TIMES);
    let state = Steady::of(&support::model(&h3p_network(h3p_recombination(60.0)), &run));
    close("H3+/H2", state.n("H3+") / state.n("H2"), 7.073e-8, 2e-3);
}

#[test]
fn oh_in_dark_gas_balances_recombination_of_h3op_and_atomic_oxygen() {
    // The oxygen chain in its simplest form: every H3+ that meets O ends as OH,
    // and O takes OH to O2. In the steady state
    //   n(OH) = k(H3O+ e-) n(H3O+) n(e-) / (k(O OH) n(O))
    //         = zeta n(H2) / (k(O OH) n(O)) x [share of H3+ that meets O].
    // Coefficients: Hillenbrand et al. 2022 (1.2e-9), Jones et al. 1981, Jensen
    // et al. 2000 (4.3e-7, all to OH here), Carty et al. 2006 (3.5e-11).
    let network = support::network(
        "H\nH2\nH2+\nH3+\nO\nOH\nO2\nOH+\nH2O+\nH3O+\nC+\ne-",
        "H2 -> H2+ + e-,cosmic_ray,1\n\
         H2+ + H2 -> H3+ + H,thermal,2.08e-9\n\
         H3+ + e- -> H2 + H,thermal,6.7e-8,-0.52\n\
         H3+ + O -> OH+ + H2,thermal,1.2e-9\n\
         OH+ + H2 -> H2O+ + H,thermal,1.01e-9\n\
         H2O+ + H2 -> H3O+ + H,thermal,6.4e-10\n\
         H3O+ + e- -> OH + H + H,thermal,4.3e-7,-0.5\n\
         O + OH -> O2 + H,thermal,3.5e-11\n\
         O2 -> O + O,cosmic_ray_photon,750\n\
         H + H -> H2,dust_h2,3e-17,0.5",
    );
    for (n_h, zeta) in [(2e3, 1e-16), (2e4, 1.3e-17), (2e5, 1.3e-17)] {
        let start = "H2 = 0.5\nO = 1e-4\n\"C+\" = 1e-8\n";
        let run = support::run_text(n_h, 10.0, zeta, start, TIMES);
        let state = Steady::of(&support::model(&network, &run));
        let n = |name: &str| state.n(name);
        let (dr, h3p_e) = (4.3e-7 * 30f64.sqrt(), 6.7e-8 * 30f64.powf(0.52));
        let case = format!("n_H {n_h:e}");
        // Exact: the tolerance is that of the steady state.
        close(&case, n("OH"), dr * n("H3O+") * n("e-") / (3.5e-11 * n("O")), 1e-6);
        let share = 1.2e-9 * n("O") / (1.2e-9 * n("O") + h3p_e * n("e-"));
        close(&case, n("OH"), zeta * n("H2") * share / (3.5e-11 * n("O")), 1e-6);
        // O2 is made by OH alone and destroyed by photons that cosmic rays
        // make: albedo 0.5.
        close(&case, n("O2"), 3.5e-11 * n("O") * n("OH") / (750.0 * zeta / 0.5), 1e-6);
    }
}

/// OH+ and H2O+ in gas with little H2: Neufeld et al. 2010, A&A 521, L10, with
/// their coefficients at 100 K: k(H2O+ e-) = 4.3e-7 (300/T)^0.5, k(OH+ H2) =
/// 1.01e-9 and k(H2O+ H2) = 6.4e-10 (Jones et al. 1981).
fn ohp_ratio(x_e: f64, f_h2: f64) -> f64 {
    // Oxygen is ionized at a made-up rate: the ratio does not depend on it.
    let network = support::network(
        "H\nH2\nO\nO+\nOH+\nH2O+\nH3O+\nC+\ne-",
        "O -> O+ + e-,cosmic_ray,1\n\
         O+ + H2 -> OH+ + H,thermal,1.7e-9\n\
         OH+ + H2 -> H2O+ + H,thermal,1.01e-9\n\
         OH+ + e- -> O + H,thermal,3.75e-8,-0.5\n\
         H2O+ + H2 -> H3O+ + H,thermal,6.4e-10\n\
         H2O+ + e- -> O + H + H,thermal,4.3e-7,-0.5\n\
         H3O+ + e- -> O + H2 + H,thermal,4.3e-7,-0.5",
    );
    let start =
        format!("H2 = {:e}\nH = {:e}\nO = 3.2e-6\n\"C+\" = {x_e:e}\n", f_h2 / 2.0, 1.0 - f_h2);
    // Long for the ions (decades), short for the hydrogen.
    let rest = "[times]\nuntil = 1e4\n[solver]\nrelative_tolerance = 1e-8\n";
    let model = support::model(&network, &support::run_text(50.0, 100.0, 1e-16, &start, rest));
    let end = support::last(&model);
    end[index(&network, "OH+")] / end[index(&network, "H2O+")]
}

#[test]
fn ohp_over_h2op_measures_the_molecular_fraction() {
    // Neufeld et al. 2010: six velocity components toward W49N,
    // x_e = 1.4e-4 and 100 K. The ratio as published, and the f(H2) derived
    // from it, which is given to two digits: 3.3 per cent at worst.
    let cases =
        [(6.8, 0.034), (3.2, 0.082), (14.6, 0.015), (9.7, 0.023), (10.5, 0.021), (11.3, 0.019)];
    for (ratio, f_h2) in cases {
        let got = ohp_ratio(1.4e-4, f_h2);
        // The law itself, with a = 0.634 and b = 1475 (provenance: memory).
        close(&format!("the law at f {f_h2}"), got, 0.6337 + 1474.9 * 1.4e-4 / f_h2, 1e-4);
        close(&format!("W49N at f {f_h2}"), got, ratio, 0.035);
    }
}

#[test]
fn ohp_over_h2op_has_a_floor_in_molecular_gas() {
    // Jones et al. 1981, Chem. Phys. Lett. 77, 484: 6.4e-10 / 1.01e-9 = 0.6337.
    // 1475 x 1.4e-4 = 0.2 stays above it at f = 1; fewer electrons, less.
    close("few electrons", ohp_ratio(1e-8, 1.0), 0.6337, 1e-3);
}

#[test]
fn a_network_with_two_stable_states_shows_both() {
    // Autocatalysis after Schloegl 1972, Z. Phys. 253, 147, closed by a sum: X is
    // made from S by two X and lost to S again,
    //   dx/dt = (1 - x) x^2 - 0.2 x + 0.001 (1 - x),
    // whose roots 0.005.., 0.28.. and 0.72.. are stable, unstable and stable.
    let rate = |x: f64| (1.0 - x) * x * x - 0.2 * x + 0.001 * (1.0 - x);
    let root = |mut low: f64, mut high: f64| {
        for _ in 0..200 {
            let middle = 0.5 * (low + high);
            if rate(middle) * rate(low) > 0.0 { low = middle } else { high = middle }
        }
        low
    };
    let network = support::network(
        "S,Q:1\nX,Q:1\n",
        "S + X + X -> X + X + X,thermal,1\nX -> S,thermal,0.2\nS -> X,thermal,0.001",
    );
    let model = support::model(&network, &support::run_text(1.0, 10.0, 0.0, "X = 1", TIMES));
    let report = model.steady_states();
    assert!(report.failures.is_empty());
    assert_eq!(report.states.len(), 2);
    let x: Vec<f64> =
        report.states.iter().map(|state| state.abundances[index(&network, "X")]).collect();
    close("from X", x[0], root(0.5, 1.0), 1e-9);
    close("from S", x[1], root(0.0, 0.1), 1e-9);
    for (state, x) in report.states.iter().zip(x) {
        assert_eq!(state.stable, Some(true));
        // d(rate)/dx by hand.
        let slope: f64 = 2.0 * x - 3.0 * x * x - 0.201;
        close("response", state.response_yr.unwrap(), -1.0 / slope / support::YEAR_S, 1e-6);
    }
}
