"""The table of liquids: reading, looking up, filtering, following temperature."""
