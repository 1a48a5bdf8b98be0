//! What can go wrong with a canvas.
//!
//! Knows nothing of files: a canvas gives bytes.

/// A drawing that could not be made.
#[derive(Debug, thiserror::Error)]
pub enum CanvasError {
    /// A side of the canvas is 0 or too long.
    #[error("a canvas of {width_px} by {height_px} px is outside 1 to {} px a side", super::Size::LONGEST_PX)]
    Size {
        /// The width asked for.
        width_px: u32,
        /// The height asked for.
        height_px: u32,
    },
    /// The picture would have no pixels, or more than the limit.
    #[error("a picture at scale {scale} would not have between 1 and {most_px} pixels")]
    Scale {
        /// The scale asked for.
        scale: f64,
        /// The most pixels that a picture may have.
        most_px: u64,
    },
    /// The PNG encoder refused the picture.
    #[error("the PNG could not be encoded: {0}")]
    Encoding(#[from] png::EncodingError),
}
