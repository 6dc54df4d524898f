//! Mathematics on f64: double-double sums, quadrature, Chebyshev panels,
//! logarithms and roots. No words of physics.

mod chebyshev;
mod double_double;
mod gauss_legendre;
mod logarithm;
mod roots;

pub use chebyshev::{Chebyshev, LARGEST_NODES, Origin};
pub use double_double::{DoubleDouble, two_product, two_sum};
pub use gauss_legendre::gauss_legendre_16;
pub use logarithm::{exponential, natural_logarithm};
pub use roots::bracketed_root;
