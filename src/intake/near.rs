//! The known field that a misspelt one may have been meant for.
//!
//! Does not know what the fields hold.

use super::ahead::{AIR_FIELDS, ALTERNATE_FIELDS, LOW_SUN_FIELDS};
use super::file::{FIELDS, PLACE_FIELDS, POLAR_FIELDS, WAYPOINT_FIELDS};
use super::pace::PROFILE_FIELDS;

/// The known field that a misspelt one shares all letters or most letters' pairs with.
pub(super) fn near_field(field: &str) -> Option<String> {
    let known = [
        &FIELDS[..],
        &WAYPOINT_FIELDS,
        &PLACE_FIELDS,
        &POLAR_FIELDS,
        &LOW_SUN_FIELDS,
        &AIR_FIELDS,
        &ALTERNATE_FIELDS,
        &PROFILE_FIELDS,
    ]
    .concat();
    let lower = field.to_ascii_lowercase();
    let letters = |word: &str| {
        let mut bytes = word.as_bytes().to_vec();
        bytes.sort_unstable();
        bytes
    };
    let pairs = |word: &str| word.as_bytes().windows(2).map(<[u8]>::to_vec).collect::<Vec<_>>();
    let given = pairs(&lower);
    let shared = |word: &str| pairs(word).iter().filter(|pair| given.contains(pair)).count();
    let exchanged = known.iter().find(|word| letters(word) == letters(&lower));
    let alike = || {
        let near = known.iter().filter(|word| shared(word) * 2 >= word.len() - 1);
        near.max_by_key(|word| shared(word))
    };
    exchanged.or_else(alike).map(|best| format!("did you mean '{best}'?"))
}
