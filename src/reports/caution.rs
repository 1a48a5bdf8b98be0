//! What every brief says about itself: how far it can be trusted and whom it defers to.

use crate::Brief;

/// What the brightness is.
pub(super) const OUTSIDE: &str = "Light of Sun, Moon and night sky outside, on level ground beneath the aircraft under a clear \
    sky; cloud takes much of it away, and it is neither the light aloft nor that on a flight deck.";
/// What the brightness inside is.
pub(super) const INSIDE: &str =
    "the light outside times factors that are the user's own; no window or seat was modelled or measured.";

/// The cautions of a brief, one sentence each.
pub(super) fn cautions(brief: &Brief) -> Vec<String> {
    let mut cautions = general();
    if brief.deck.is_some() {
        cautions.push(DECK.to_string());
    }
    cautions.push(ut1(brief.dut1_s));
    if brief.flight.recorded.is_some() {
        cautions.push(
            "Positions are those recorded, joined by shortest paths at a constant ground speed.".to_string(),
        );
    } else if brief.flight.waypoints.is_empty() {
        let pace = if brief.path.legs().len() == 1 { "a constant ground speed" } else { "the speeds given" };
        cautions.push(format!("Positions are those of the shortest path at {pace}."));
    }
    cautions
}

/// How the deck's horizon is reckoned, and how it meets the one beneath.
const DECK: &str = "From the deck the horizon is that of the standard atmosphere over a clear sea, or over the height \
                    given for it: the ray that grazes it is bent on its way down and again on its way up. At height 0 \
                    that air bends by 33′ where the almanacs' convention beneath takes 34′, so the two limits meet to \
                    within 1′ there and are not blended. 15 K warmer or colder air moves the deck's limit by 0.08°, \
                    and cloud at the horizon hides the Sun sooner. Levels are taken as heights above the sea.";

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
