//! Gzip, undone within bounds.
//!
//! Does not know what is inside.

use super::super::draft::Origin;
use super::super::problem::IntakeError;
use super::TrackProblem;
use flate2::read::MultiGzDecoder;
use std::borrow::Cow;
use std::io::{ErrorKind, Read};

/// The most of a file that is read, compressed or not: some thirty flights of 16 hours at one point a second.
pub(super) const LARGEST_MIB: usize = 256;
const LARGEST: usize = LARGEST_MIB << 20;
/// Recorded tracks shrink to a twentieth at the most; DEFLATE itself can reach 1,032.
pub(super) const STEEPEST_RATIO: usize = 200;
/// Below this size the ratio does not matter.
const HARMLESS: usize = 1 << 20;
/// RFC 1952, 2.3.1: ID1, ID2, and CM = 8 for DEFLATE.
const MAGIC: [u8; 3] = [0x1f, 0x8b, 8];

/// Whether the bytes are gzip.
pub(super) fn is_gzip(bytes: &[u8]) -> bool {
    bytes.starts_with(&MAGIC)
}

/// The beginning of the content, as far as it can be had: plain bytes as they are, gzip undone.
pub(super) fn beginning(bytes: &[u8], length: usize) -> Cow<'_, [u8]> {
    if !is_gzip(bytes) {
        return Cow::Borrowed(&bytes[..bytes.len().min(length)]);
    }
    let mut head = Vec::new();
    // what comes before the damage is enough to tell the kind
    let _ = MultiGzDecoder::new(bytes).take(length as u64).read_to_end(&mut head);
    Cow::Owned(head)
}

/// The content of a file: plain bytes as they are, gzip (RFC 1952) undone, of at most 256 MiB.
///
/// # Errors
/// Gzip that ends early, is damaged or swells beyond any track; a file that is too large.
pub fn plain<'b>(bytes: &'b [u8], source_name: &str) -> Result<Cow<'b, [u8]>, IntakeError> {
    undone(bytes).map_err(|problem| IntakeError {
        source_name: source_name.to_string(),
        origin: Origin::Whole,
        problem: problem.into(),
    })
}

fn undone(bytes: &[u8]) -> Result<Cow<'_, [u8]>, TrackProblem> {
    if bytes.len() > LARGEST {
        return Err(TrackProblem::TooLarge);
    }
    if !is_gzip(bytes) {
        return Ok(Cow::Borrowed(bytes));
    }
    let by_ratio = bytes.len().saturating_mul(STEEPEST_RATIO).max(HARMLESS);
    let most = by_ratio.min(LARGEST);
    let mut content = Vec::new();
    let outcome = MultiGzDecoder::new(bytes).take(most as u64 + 1).read_to_end(&mut content);
    match outcome {
        Err(error) if error.kind() == ErrorKind::UnexpectedEof => {
            Err(TrackProblem::GzipTruncated(content.len()))
        }
        Err(_) => Err(TrackProblem::GzipDamaged(content.len())),
        Ok(_) if content.len() > most && most == LARGEST => Err(TrackProblem::TooLarge),
        Ok(_) if content.len() > most => Err(TrackProblem::GzipBomb),
        Ok(_) if is_gzip(&content) => Err(TrackProblem::GzipTwice),
        Ok(_) => Ok(Cow::Owned(content)),
    }
}
