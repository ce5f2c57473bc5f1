"""One module per screen of the workbench."""
