//! A flight as it was recorded.
