//! The committed reports, and the README's commands.

mod fresh;
mod readme;
mod json;
