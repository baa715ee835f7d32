//! One cloud from start to end: its run file, its start, its evolution and its
//! steady states.
//!
//! [`RunFile::read`] turns the text of a run file into a [`RunFile`], or into
//! every finding in it; [`Model::new`] joins that to a network; the model then
//! evolves ([`Model::evolve`]) or settles ([`Model::steady_states`]). Nothing
//! here touches files: texts come in, values go out.

mod document;
mod evolve;
mod model;
mod runfile;
pub mod shipped;
mod start;
mod steady;

pub use document::Document;
pub use evolve::{Conservation, Evolution, TimePoint};
pub use model::Model;
pub use runfile::{RunFile, Solver, Times};
pub use steady::{SteadyReport, SteadyStateFound};
