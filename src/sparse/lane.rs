//! The scalar of the solver: one number per cell computed side by side.
//!
//! [`Wide`] holds eight cells in one 64-byte group, which is one AVX-512
//! register or two AVX2 ones; [`Single`] holds one. All arithmetic is element
//! by element in a fixed order, so a cell's bits depend neither on its
//! neighbours nor on the width. Whether `a * b + c` is rounded once ([`Fused`])
//! or twice ([`Separate`]) is part of the type: processors with a fused
//! multiply-add instruction use the former and agree with each other bit for
//! bit, older ones the latter.

use std::fmt::Debug;
use std::marker::PhantomData;
use std::ops::{Add, Div, Mul, Neg, Sub};

/// How `a * b + c` is rounded.
pub trait Arithmetic: Copy + Debug + Default + Send + Sync + 'static {
    /// `a * b + c`.
    fn mul_add(a: f64, b: f64, c: f64) -> f64;
}

/// One rounding for `a * b + c` (IEEE 754 fused multiply-add).
#[derive(Clone, Copy, Debug, Default)]
pub struct Fused;

impl Arithmetic for Fused {
    #[inline(always)]
    fn mul_add(a: f64, b: f64, c: f64) -> f64 {
        a.mul_add(b, c)
    }
}

/// A rounding each for the product and the sum.
#[derive(Clone, Copy, Debug, Default)]
pub struct Separate;

impl Arithmetic for Separate {
    #[inline(always)]
    fn mul_add(a: f64, b: f64, c: f64) -> f64 {
        a * b + c
    }
}

/// A group of numbers, one per cell, with element-wise arithmetic.
pub trait Lane:
    Copy
    + Debug
    + Send
    + Sync
    + 'static
    + Add<Output = Self>
    + Sub<Output = Self>
    + Mul<Output = Self>
    + Div<Output = Self>
    + Neg<Output = Self>
{
    /// Cells in the group.
    const WIDTH: usize;

    /// The same number in every cell.
    fn splat(value: f64) -> Self;
    /// The number of one cell.
    fn get(&self, cell: usize) -> f64;
    /// Sets the number of one cell.
    fn set(&mut self, cell: usize, value: f64);
    /// `self * factor + addend`.
    fn mul_add(self, factor: Self, addend: Self) -> Self;
    /// Absolute value.
    fn abs(self) -> Self;
    /// The larger of two.
    fn max(self, other: Self) -> Self;

    /// Zero in every cell.
    #[inline(always)]
    fn zero() -> Self {
        Self::splat(0.0)
    }
}

/// Eight cells in a 64-byte group.
#[derive(Clone, Copy, Debug)]
#[repr(C, align(64))]
pub struct Wide<A>([f64; 8], PhantomData<A>);

/// One cell.
#[derive(Clone, Copy, Debug)]
#[repr(transparent)]
pub struct Single<A>(f64, PhantomData<A>);

impl<A: Arithmetic> Wide<A> {
    #[inline(always)]
    fn map2(self, other: Self, f: impl Fn(f64, f64) -> f64) -> Self {
        let mut out = [0.0; 8];
        for i in 0..8 {
            out[i] = f(self.0[i], other.0[i]);
        }
        Self(out, PhantomData)
    }
}

impl<A: Arithmetic> Single<A> {
    #[inline(always)]
    fn map2(self, other: Self, f: impl Fn(f64, f64) -> f64) -> Self {
        Self(f(self.0, other.0), PhantomData)
    }
}

impl<A: Arithmetic> Lane for Wide<A> {
    const WIDTH: usize = 8;

    #[inline(always)]
    fn splat(value: f64) -> Self {
        Self([value; 8], PhantomData)
    }
    #[inline(always)]
    fn get(&self, cell: usize) -> f64 {
        self.0[cell]
    }
    #[inline(always)]
    fn set(&mut self, cell: usize, value: f64) {
        self.0[cell] = value;
    }
    #[inline(always)]
    fn mul_add(self, factor: Self, addend: Self) -> Self {
        let mut out = [0.0; 8];
        for (i, o) in out.iter_mut().enumerate() {
            *o = A::mul_add(self.0[i], factor.0[i], addend.0[i]);
        }
        Self(out, PhantomData)
    }
    #[inline(always)]
    fn abs(self) -> Self {
        self.map2(self, |a, _| a.abs())
    }
    #[inline(always)]
    fn max(self, other: Self) -> Self {
        self.map2(other, larger)
    }
}

impl<A: Arithmetic> Lane for Single<A> {
    const WIDTH: usize = 1;

    #[inline(always)]
    fn splat(value: f64) -> Self {
        Self(value, PhantomData)
    }
    #[inline(always)]
    fn get(&self, _cell: usize) -> f64 {
        self.0
    }
    #[inline(always)]
    fn set(&mut self, _cell: usize, value: f64) {
        self.0 = value;
    }
    #[inline(always)]
    fn mul_add(self, factor: Self, addend: Self) -> Self {
        Self(A::mul_add(self.0, factor.0, addend.0), PhantomData)
    }
    #[inline(always)]
    fn abs(self) -> Self {
        Self(self.0.abs(), PhantomData)
    }
    #[inline(always)]
    fn max(self, other: Self) -> Self {
        self.map2(other, larger)
    }
}

/// The larger of two numbers as a compare and a select, which every
/// instruction set has; a NaN on the left is kept.
#[inline(always)]
fn larger(a: f64, b: f64) -> f64 {
    if a < b { b } else { a }
}

macro_rules! elementwise {
    ($lane:ident, $($trait:ident $method:ident $op:tt),*) => {$(
        impl<A: Arithmetic> $trait for $lane<A> {
            type Output = Self;
            #[inline(always)]
            fn $method(self, other: Self) -> Self {
                self.map2(other, |a, b| a $op b)
            }
        }
    )*};
}
elementwise!(Wide, Add add +, Sub sub -, Mul mul *, Div div /);
elementwise!(Single, Add add +, Sub sub -, Mul mul *, Div div /);

impl<A: Arithmetic> Neg for Wide<A> {
    type Output = Self;
    #[inline(always)]
    fn neg(self) -> Self {
        self.map2(self, |a, _| -a)
    }
}

impl<A: Arithmetic> Neg for Single<A> {
    type Output = Self;
    #[inline(always)]
    fn neg(self) -> Self {
        Self(-self.0, PhantomData)
    }
}
