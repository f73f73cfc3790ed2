Console.WriteLine("chainsolve");
