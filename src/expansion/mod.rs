//! One model's history: densities, direct quadrature, panels checked against it, and their inverses.
