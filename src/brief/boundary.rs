//! Whether a take-off or landing falls so near to a legal boundary that minutes decide.

use crate::light::{Limit, along};
use crate::path::Path;
use crate::sky::Sky;
use crate::units::{Instant, Place};

/// How near is near: published tables are to the minute, and so are logged times.
const NEAR_S: f64 = 120.0;

/// The limits that rules of night are drawn by and that the Sun meets within two minutes of take-off, and of landing.
pub(super) fn of(path: &Path, sky: &Sky) -> (Vec<Limit>, Vec<Limit>) {
    let legs = path.legs();
    (near(legs[0].from, path.takeoff, sky), near(legs[legs.len() - 1].to, path.landing(), sky))
}

fn near(place: Place, at: Instant, sky: &Sky) -> Vec<Limit> {
    let about = Path::standing(place, at.after_s(-NEAR_S), 2.0 * NEAR_S);
    let met = along(&about, sky).crossings.into_iter().map(|crossing| crossing.limit);
    met.filter(|limit| matches!(limit, Limit::Horizon | Limit::Civil)).collect()
}
