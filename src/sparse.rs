//! Sparse linear algebra over lanes: the pattern of a matrix, an elimination
//! order for it, and an LU factorization of eight systems side by side.
//!
//! The pattern is the same for every cell of a network, so ordering and fill
//! are worked out once ([`Symbolic`]); only numbers change afterwards
//! ([`Factors`]). A *lane* is one of the cells that are computed together
//! ([`Lane`]). This room knows no chemistry.

mod lane;
mod lu;
mod order;
mod pattern;
mod processor;

pub use lane::{Arithmetic, Fused, Lane, Separate, Single, Wide};
pub use lu::{Factors, Symbolic};
pub use order::elimination_order;
pub use pattern::Pattern;
pub use processor::{has_fused_arithmetic, with_best_instructions};
