"""Steps of the data build, one responsibility each."""
