//! Choice of the instruction set at run time, so that a stock build is fast on
//! machines with AVX-512, with AVX2, and with neither.

use pulp::{Arch, Simd, WithSimd};

/// Runs `task` compiled for the best instruction set of this processor. Only
/// code that is inlined into `task` profits: mark it `#[inline(always)]`.
#[inline(always)]
pub fn with_best_instructions<T>(task: impl FnOnce() -> T) -> T {
    Arch::new().dispatch(task)
}

/// Whether the instruction set that [`with_best_instructions`] chooses has a
/// fused multiply-add.
#[must_use]
pub fn has_fused_arithmetic() -> bool {
    struct Ask;
    impl WithSimd for Ask {
        type Output = bool;
        fn with_simd<S: Simd>(self, _simd: S) -> bool {
            !S::IS_SCALAR
        }
    }
    Arch::new().dispatch(Ask)
}
