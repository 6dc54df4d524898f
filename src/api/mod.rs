//! Routes, extractors, problem details, layers and the OpenAPI document.
