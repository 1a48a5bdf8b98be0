//! The words that states, events and circles go by, for machines and for people.

use crate::light::{Direction, Event, Limit, State};
use crate::path::{CircleName, Heading};

/// A state's key in JSON and CSV.
pub(crate) fn state_key(state: State) -> &'static str {
    match state {
        State::Daylight => "daylight",
        State::CivilTwilight => "civil_twilight",
        State::NauticalTwilight => "nautical_twilight",
        State::AstronomicalTwilight => "astronomical_twilight",
        State::Darkness => "darkness",
    }
}

/// A state's name where room is scarce.
pub(crate) fn state_short(state: State) -> &'static str {
    match state {
        State::Daylight => "day",
        State::CivilTwilight => "civil",
        State::NauticalTwilight => "naut.",
        State::AstronomicalTwilight => "astr.",
        State::Darkness => "dark",
    }
}

/// The elevation of a limit as it is usually written.
pub(crate) fn limit_elevation(limit: Limit) -> &'static str {
    match limit {
        Limit::Horizon => "−50′",
        Limit::Civil => "−6°",
        Limit::Nautical => "−12°",
        Limit::Astronomical => "−18°",
    }
}

/// Whether the Sun shows, as a key.
pub(crate) fn visibility_key(sun_visible: bool) -> &'static str {
    if sun_visible { "sun_visible" } else { "sun_below_horizon" }
}

/// A limit's key.
pub(crate) fn limit_key(limit: Limit) -> &'static str {
    match limit {
        Limit::Horizon => "horizon",
        Limit::Civil => "civil",
        Limit::Nautical => "nautical",
        Limit::Astronomical => "astronomical",
    }
}

/// A direction's key.
pub(crate) fn direction_key(direction: Direction) -> &'static str {
    match direction {
        Direction::Rising => "rising",
        Direction::Setting => "setting",
    }
}

/// An event's key.
pub(crate) fn event_key(event: Event) -> &'static str {
    match event {
        Event::Sunrise => "sunrise",
        Event::Sunset => "sunset",
        Event::CivilDawn => "civil_dawn",
        Event::CivilDusk => "civil_dusk",
        Event::NauticalDawn => "nautical_dawn",
        Event::NauticalDusk => "nautical_dusk",
        Event::AstronomicalDawn => "astronomical_dawn",
        Event::AstronomicalDusk => "astronomical_dusk",
    }
}

/// A moonrise's or moonset's key.
pub(crate) fn moon_event_key(direction: Direction) -> &'static str {
    match direction {
        Direction::Rising => "moonrise",
        Direction::Setting => "moonset",
    }
}

/// A circle's key.
pub(crate) fn circle_key(circle: CircleName) -> &'static str {
    match circle {
        CircleName::ArcticCircle => "arctic_circle",
        CircleName::AntarcticCircle => "antarctic_circle",
        CircleName::NorthPolarArea => "north_polar_area",
        CircleName::SouthPolarArea => "south_polar_area",
        CircleName::TropicOfCancer => "tropic_of_cancer",
        CircleName::TropicOfCapricorn => "tropic_of_capricorn",
        CircleName::Equator => "equator",
        CircleName::Meridian180 => "meridian_180",
    }
}

/// A circle's name for people.
pub(crate) fn circle_name(circle: CircleName) -> &'static str {
    match circle {
        CircleName::ArcticCircle => "Arctic Circle",
        CircleName::AntarcticCircle => "Antarctic Circle",
        CircleName::NorthPolarArea => "North Polar Area",
        CircleName::SouthPolarArea => "South Polar Area",
        CircleName::TropicOfCancer => "Tropic of Cancer",
        CircleName::TropicOfCapricorn => "Tropic of Capricorn",
        CircleName::Equator => "Equator",
        CircleName::Meridian180 => "180° meridian",
    }
}

/// A heading's key.
pub(crate) fn heading_key(heading: Heading) -> &'static str {
    match heading {
        Heading::Northbound => "northbound",
        Heading::Southbound => "southbound",
        Heading::Eastbound => "eastbound",
        Heading::Westbound => "westbound",
    }
}

/// A key as people read it: words parted by spaces.
pub(crate) fn spoken(key: &str) -> String {
    key.replace('_', " ")
}
