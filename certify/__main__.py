"""``python -m certify`` is ``certify``."""

import sys

from certify.commands.main import main

sys.exit(main())
