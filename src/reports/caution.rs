//! What every brief says about itself: how far it can be trusted and whom it defers to.

use crate::Brief;

/// The cautions of a brief, one sentence each.
pub(super) fn cautions(brief: &Brief) -> Vec<String> {
    let mut cautions = general();
    cautions.push(ut1(brief.dut1_s));
    if brief.flight.waypoints.is_empty() {
        let pace = if brief.path.legs().len() == 1 { "a constant ground speed" } else { "the speeds given" };
        cautions.push(format!("Positions are those of the shortest path at {pace}."));
    }
    cautions
}

/// How UT1 − UTC was taken, and what it does to the times.
pub(super) fn ut1(dut1_s: f64) -> String {
    if dut1_s == 0.0 {
        "UT1 − UTC is taken as 0 s; it may be up to 0.9 s either way, which moves a time by as much, and by more where \
         the Sun moves slowly along the path."
            .to_string()
    } else {
        format!("UT1 − UTC is taken as {dut1_s} s, as given.")
    }
}

/// The cautions that hold for any time computed here.
pub(super) fn general() -> Vec<String> {
    [
        "Computed light, not a judgement: it does not say that a crew is fit or an operation lawful. The operator's \
         manual, the authority and its published tables decide.",
        "Times are for a clear sea-level horizon beneath the aircraft with the almanacs' refraction (Sun's centre 50′ \
         below it at sunrise and sunset); terrain, cloud and weather move them, and refraction alone scatters sunrise \
         and sunset by a minute or more, by many minutes at high latitudes.",
    ]
    .map(str::to_string)
    .to_vec()
}

/// The cautions of a place's days.
pub(super) fn at_place(dut1_s: f64) -> Vec<String> {
    let [judges, ..] = &general()[..] else { return Vec::new() };
    let ut1 = if dut1_s == 0.0 {
        "UT1 − UTC is taken as 0 s; it may be up to 0.9 s either way, which moves all times by as much."
            .to_string()
    } else {
        ut1(dut1_s)
    };
    let horizon = "Times are for a clear sea-level horizon at the place with the almanacs' refraction (Sun's centre 50′ \
                   below it at sunrise and sunset, Moon's upper limb 34′); height, terrain, cloud and weather move them, and \
                   refraction alone scatters them by a minute or more, at high latitudes by many minutes, or by days where \
                   a polar day or night begins or ends.";
    vec![judges.clone(), horizon.to_string(), ut1]
}
