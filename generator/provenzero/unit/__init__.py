"""What is known of one hydraulic control unit."""
