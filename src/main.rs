//! The command line of gloamline.

fn main() {}
