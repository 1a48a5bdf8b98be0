//! UT1 − UTC: how far the turning Earth is from the clock.

/// Largest |UT1 − UTC| in seconds that UTC allows (Recommendation ITU-R TF.460-6, annex 1).
pub const DUT1_BOUND_S: f64 = 0.9;

/// UT1 − UTC in seconds, within what UTC allows.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Dut1(f64);

/// A UT1 − UTC that UTC does not allow.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[error("UT1 − UTC of {0} s is outside −{DUT1_BOUND_S} s to {DUT1_BOUND_S} s")]
pub struct Dut1Error(pub f64);

impl Dut1 {
    /// UT1 − UTC from seconds.
    ///
    /// # Errors
    /// More than 0.9 s either way, or not a number.
    pub fn from_s(seconds: f64) -> Result<Self, Dut1Error> {
        if seconds.abs() <= DUT1_BOUND_S { Ok(Self(seconds)) } else { Err(Dut1Error(seconds)) }
    }

    /// The difference in seconds.
    pub const fn s(self) -> f64 {
        self.0
    }
}
