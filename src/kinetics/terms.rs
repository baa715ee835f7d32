//! The right-hand side and Jacobian rows as lists of terms.
//!
//! The equation of species i is a sum of terms, each a coefficient times one,
//! two or three abundances:
//!
//! ```text
//! dx_i/dt = sum c x_a  +  x_i sum c x_b  +  sum c x_a x_b  +  sum c x_a x_b x_d
//!           linear        own              product           triple
//! ```
//!
//! "Own" terms are products that contain x_i itself; nearly all of the losses
//! are of this kind, and their sum is needed once for the value and once for
//! the diagonal. Coefficients are stored in the order in which they are used.

use super::Kinetics;
use crate::integrate::{Invariants, System};
use crate::sparse::{Lane, Symbolic};

/// One term of one equation. The order of the variants is the order of
/// evaluation.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Term {
    Linear(u32),
    Own(u32),
    Product(u32, u32),
    Triple(u32, u32, u32),
}

impl Term {
    /// The term in the equation of `species` with the given factors (sorted
    /// positions, one to three).
    pub(super) fn new(species: usize, factors: Vec<usize>) -> Self {
        let mut f: Vec<u32> = factors.into_iter().map(|i| i as u32).collect();
        f.sort_unstable();
        let own = species as u32;
        match f[..] {
            [a] => Self::Linear(a),
            [a, b] if a == own && b != own => Self::Own(b),
            [a, b] if b == own && a != own => Self::Own(a),
            [a, b] => Self::Product(a, b),
            [a, b, c] => Self::Triple(a, b, c),
            _ => panic!("a rate depends on one to three species, not {}", f.len()),
        }
    }
}

/// How many terms of each kind an equation has.
#[derive(Clone, Copy, Debug, Default)]
struct Counts {
    linear: usize,
    own: usize,
    product: usize,
    triple: usize,
}

/// All equations, in the order of the unknowns.
#[derive(Clone, Debug, Default)]
pub(super) struct Program {
    counts: Vec<Counts>,
    /// First coefficient and first factor of each equation, and the ends.
    starts: Vec<(usize, usize)>,
    factors: Vec<u32>,
    current: Counts,
}

impl Program {
    /// Adds a term to the equation under way, in the order of [`Term`].
    pub(super) fn push(&mut self, term: &Term) {
        if self.starts.is_empty() {
            self.starts.push((0, 0));
        }
        match *term {
            Term::Linear(a) => {
                self.current.linear += 1;
                self.factors.push(a);
            }
            Term::Own(b) => {
                self.current.own += 1;
                self.factors.push(b);
            }
            Term::Product(a, b) => {
                self.current.product += 1;
                self.factors.extend([a, b]);
            }
            Term::Triple(a, b, c) => {
                self.current.triple += 1;
                self.factors.extend([a, b, c]);
            }
        }
    }

    /// Closes the equation under way.
    pub(super) fn end_species(&mut self) {
        if self.starts.is_empty() {
            self.starts.push((0, 0));
        }
        let c = std::mem::take(&mut self.current);
        let (coefficient, _) = self.starts[self.counts.len()];
        self.starts
            .push((coefficient + c.linear + c.own + c.product + c.triple, self.factors.len()));
        self.counts.push(c);
    }

    /// Evaluates equation `i`; `row` receives minus its Jacobian row where it
    /// is wanted.
    #[inline(always)]
    fn equation<L: Lane>(&self, i: usize, c: &[L], x: &[L], mut row: Option<&mut [L]>) -> L {
        let counts = self.counts[i];
        let (first, first_factor) = self.starts[i];
        let (last, last_factor) = self.starts[i + 1];
        let c = &c[first..last];
        let f = &self.factors[first_factor..last_factor];
        let (linear, c) = c.split_at(counts.linear);
        let (linear_f, f) = f.split_at(counts.linear);
        let (own, c) = c.split_at(counts.own);
        let (own_f, f) = f.split_at(counts.own);
        let (product, triple) = c.split_at(counts.product);
        let (product_f, triple_f) = f.split_at(2 * counts.product);
        let mut value = [L::zero(); 2];
        for (m, (&c, &a)) in linear.iter().zip(linear_f).enumerate() {
            let a = a as usize;
            value[m % 2] = c.mul_add(x[a], value[m % 2]);
            if let Some(row) = row.as_deref_mut() {
                row[a] = row[a] - c;
            }
        }
        let xi = x[i];
        let mut own_sum = [L::zero(); 2];
        for (m, (&c, &b)) in own.iter().zip(own_f).enumerate() {
            let b = b as usize;
            own_sum[m % 2] = c.mul_add(x[b], own_sum[m % 2]);
            if let Some(row) = row.as_deref_mut() {
                row[b] = (-c).mul_add(xi, row[b]);
            }
        }
        let own_sum = own_sum[0] + own_sum[1];
        value[0] = own_sum.mul_add(xi, value[0]);
        if let Some(row) = row.as_deref_mut() {
            row[i] = row[i] - own_sum;
        }
        for (m, (&c, ab)) in product.iter().zip(product_f.chunks_exact(2)).enumerate() {
            let (a, b) = (ab[0] as usize, ab[1] as usize);
            let by_b = c * x[a];
            value[m % 2] = by_b.mul_add(x[b], value[m % 2]);
            if let Some(row) = row.as_deref_mut() {
                row[a] = (-c).mul_add(x[b], row[a]);
                row[b] = row[b] - by_b;
            }
        }
        for (&c, abd) in triple.iter().zip(triple_f.chunks_exact(3)) {
            let [a, b, d] = [abd[0] as usize, abd[1] as usize, abd[2] as usize];
            value[1] = (c * x[a] * x[b]).mul_add(x[d], value[1]);
            if let Some(row) = row.as_deref_mut() {
                row[a] = row[a] - c * x[b] * x[d];
                row[b] = row[b] - c * x[a] * x[d];
                row[d] = row[d] - c * x[a] * x[b];
            }
        }
        value[0] + value[1]
    }
}

impl System for Kinetics {
    fn size(&self) -> usize {
        self.program.counts.len()
    }

    fn parameters(&self) -> usize {
        self.terms()
    }

    fn symbolic(&self) -> &Symbolic {
        &self.symbolic
    }

    fn invariants(&self) -> &Invariants {
        &self.invariants
    }

    #[inline(always)]
    fn rate_of_change<L: Lane>(&self, parameters: &[L], y: &[L], f: &mut [L]) {
        for (i, f) in f.iter_mut().enumerate() {
            *f = self.program.equation(i, parameters, y, None);
        }
    }

    #[inline(always)]
    fn subtract_jacobian_row<L: Lane>(
        &self,
        i: usize,
        parameters: &[L],
        y: &[L],
        row: &mut [L],
    ) -> L {
        self.program.equation(i, parameters, y, Some(row))
    }
}
