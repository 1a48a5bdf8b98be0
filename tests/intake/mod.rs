//! What flights are read from.

mod notation;
mod route;
mod fixes;
mod profile;
mod block;

/// A flight that wants nothing more.
const FLIGHT: &str =
    "from = \"CYYZ\"\nto = \"VHHH\"\ntakeoff = 2026-12-18T05:10:00Z\nairborne = \"14h55m\"\n";

/// What is said of a flight file that is refused, with its cure.
fn said(text: &str) -> String {
    let error = gloamline::intake::flight_file(text, "f.toml").unwrap_err();
    let hint = error.hint().map_or(String::new(), |hint| format!("\n{hint}"));
    format!("{error}{hint}")
}
