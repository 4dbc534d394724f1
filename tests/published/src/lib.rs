//! Reading the published tables kept in `data/`.
