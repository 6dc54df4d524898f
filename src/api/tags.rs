//! Under which headings the document lists its routes.

/// The tag of the conversions.
pub(crate) const CONVERT: &str = "convert";
/// The tag of the models.
pub(crate) const MODELS: &str = "models";
/// The tag of what is around the jobs.
pub(crate) const AROUND: &str = "service";
