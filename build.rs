//! Rebuilds the crate when a shipped network or run changes: they are compiled in.

fn main() {
    println!("cargo:rerun-if-changed=networks");
    println!("cargo:rerun-if-changed=runs");
}
