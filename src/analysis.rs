//! What a model's numbers mean: which reactions make and destroy a species.
//!
//! Values in, values out; nothing here prints or touches files.

pub mod channels;
