//! Mathematics on f64: quadrature, panels, roots, double-double sums. No words of physics.
