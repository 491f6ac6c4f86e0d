//! Published experiments beside the screening physics: a first reality check.
