"""Small models of an invented boatyard, and the script that makes them."""
