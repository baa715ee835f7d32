//! Figures as PNG, for programs that do not read SVG. Needs feature `png`.

use resvg::{tiny_skia, usvg};
use std::sync::{Arc, OnceLock};

/// Why a figure could not be turned into a picture.
#[derive(Debug, thiserror::Error)]
pub enum PngError {
    /// The text is not SVG.
    #[error("the figure is not readable as SVG: {0}")]
    Svg(#[from] usvg::Error),
    /// The size in pixels is zero, not finite, or beyond 16384 on a side.
    #[error("a picture of {width} by {height} pixels cannot be made; choose another scale")]
    Size {
        /// Pixels across.
        width: f32,
        /// Pixels down.
        height: f32,
    },
    /// The picture could not be encoded.
    #[error("the picture could not be encoded: {0}")]
    Encode(String),
    /// No typeface was found, so that all text would be missing.
    #[error(
        "no font is installed, so the figure's text cannot be drawn; install one or keep the SVG"
    )]
    NoFont,
}

/// Draws an SVG figure with `scale` pixels per user unit (2 suits screens,
/// 4 print) and returns the bytes of a PNG file.
///
/// # Errors
///
/// See [`PngError`].
pub fn render(svg: &str, scale: f32) -> Result<Vec<u8>, PngError> {
    let fontdb = fonts();
    if fontdb.is_empty() {
        return Err(PngError::NoFont);
    }
    let options = usvg::Options { fontdb, ..usvg::Options::default() };
    let tree = usvg::Tree::from_str(svg, &options)?;
    let (width, height) =
        ((tree.size().width() * scale).ceil(), (tree.size().height() * scale).ceil());
    let fits = |v: f32| (1.0..=16384.0).contains(&v);
    if !(fits(width) && fits(height)) {
        return Err(PngError::Size { width, height });
    }
    let mut picture = tiny_skia::Pixmap::new(width as u32, height as u32)
        .ok_or(PngError::Size { width, height })?;
    resvg::render(&tree, tiny_skia::Transform::from_scale(scale, scale), &mut picture.as_mut());
    picture.encode_png().map_err(|e| PngError::Encode(e.to_string()))
}

/// The system's typefaces, found once.
fn fonts() -> Arc<usvg::fontdb::Database> {
    static FONTS: OnceLock<Arc<usvg::fontdb::Database>> = OnceLock::new();
    let load = || {
        let mut db = usvg::fontdb::Database::new();
        db.load_system_fonts();
        let known =
            |name: &str| db.faces().any(|f| f.families.iter().any(|(family, _)| family == name));
        let usual = ["Helvetica", "Arial", "Liberation Sans", "Arimo", "Noto Sans", "DejaVu Sans"];
        let first = db.faces().find_map(|f| f.families.first().map(|(name, _)| name.clone()));
        let generic = usual.into_iter().find(|n| known(n)).map(str::to_owned).or(first);
        if let Some(name) = generic {
            db.set_sans_serif_family(name);
        }
        Arc::new(db)
    };
    Arc::clone(FONTS.get_or_init(load))
}
